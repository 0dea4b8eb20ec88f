import { expect, test } from 'vitest';
import { geometries } from '#src/chem/geometry/index.ts';
import { apply, dot, length, multiply, subtract, transpose, type Vector3 } from '#src/chem/geometry/vector.ts';
import { finiteGroup } from '#src/chem/symmetry/finite-group.ts';
import { vibrations, vibrationsOfAtoms } from '#src/chem/symmetry/index.ts';
import {
  lineFrame,
  type ModeVector,
  modeVectors,
  type PlacedAtoms,
  placeSkeleton,
} from '#src/chem/symmetry/mode-vectors.ts';

const alike = (geometry: string) => ({
  geometry,
  sites: geometries.find(({ symbol }) => symbol === geometry)!.vertices.map(() => 'A'),
});
const overlap = (a: readonly Vector3[], b: readonly Vector3[]): number =>
  a.reduce((sum, v, i) => sum + dot(v, b[i]!), 0);

/** The trace of an operation over one set of partners is the character of their irrep. */
function characterOver({ positions, frame, group }: PlacedAtoms, set: readonly ModeVector[], c: number): number {
  const { representative } = finiteGroup(group)!.classes[c]!;
  const m = multiply(transpose(frame), multiply(representative, frame));
  const to = positions.map((p) => positions.findIndex((q) => length(subtract(q, apply(m, p))) < 1e-3));
  return set.reduce((sum, { vectors }) => {
    const moved = vectors.map((): Vector3 => [0, 0, 0]);
    vectors.forEach((v, i) => {
      moved[to[i]!] = apply(m, v);
    });
    return sum + overlap(vectors, moved);
  }, 0);
}

const finite = geometries.filter(({ symbol }) => symbol !== 'L-2').map(({ symbol }) => symbol);

test.each(finite)('%s: orthonormal displacements, counted and transforming as the irreps say', (symbol) => {
  const placed = placeSkeleton(alike(symbol));
  const modes = modeVectors(placed);
  modes.forEach((a, i) => {
    modes.forEach((b, j) => {
      expect(overlap(a.vectors, b.vectors)).toBeCloseTo(Number(i === j), 8);
    });
  });
  const group = finiteGroup(placed.group)!;
  for (const { irrep, count } of vibrations(alike(symbol)).vibrations) {
    const row = group.irreps.find(({ label }) => label === irrep)!;
    for (let set = 0; set < count; set++) {
      const partners = modes.filter((mode) => mode.irrep === irrep && mode.set === set);
      expect(partners).toHaveLength(row.dimension);
      group.classes.forEach((_, c) => {
        expect(characterOver(placed, partners, c)).toBeCloseTo(row.characters[c]!, 6);
      });
    }
  }
  // 3N − 6 in all.
  expect(modes).toHaveLength(3 * placed.positions.length - 6);
});

test('no vibration moves or turns the whole', () => {
  const placed = placeSkeleton(alike('TBPY-5'));
  for (const { vectors } of modeVectors(placed))
    for (let k = 0; k < 3; k++) {
      expect(vectors.reduce((sum, v) => sum + v[k]!, 0)).toBeCloseTo(0, 8);
      const turn = placed.positions.reduce((sum, p, i) => {
        const v = vectors[i]!;
        const [a, b] = [(k + 1) % 3, (k + 2) % 3];
        return sum + p[a]! * v[b]! - p[b]! * v[a]!;
      }, 0);
      expect(turn).toBeCloseTo(0, 8);
    }
});

test('the symmetric stretch of an octahedron moves six donors outwards alike, the metal not at all', () => {
  const placed = placeSkeleton(alike('OC-6'));
  const breathing = modeVectors(placed).find(({ irrep }) => irrep === 'A1g')!;
  expect(length(breathing.vectors[0]!)).toBeCloseTo(0, 10);
  placed.positions.slice(1).forEach((p, i) => {
    expect(dot(p, breathing.vectors[i + 1]!)).toBeCloseTo(1 / Math.sqrt(6), 8);
  });
});

// Usual assignment of XY6: ν3 of T1u a stretch, ν4 a bend; T2g and T2u are bends (K. Nakamoto, Infrared and Raman
// Spectra of Inorganic and Coordination Compounds; from memory).
test('of an octahedron T1u comes as a stretch and a bend, T2g and T2u as bends', () => {
  const modes = modeVectors(placeSkeleton(alike('OC-6')));
  const stretch = (irrep: string, set: number) =>
    modes.find((mode) => mode.irrep === irrep && mode.set === set)!.stretch;
  expect(stretch('T1u', 0)).toBeGreaterThan(0.9);
  expect(stretch('T1u', 1)).toBeLessThan(0.1);
  expect(stretch('T2g', 0)).toBeCloseTo(0, 6);
  expect(stretch('T2u', 0)).toBeCloseTo(0, 6);
});

test('the three atoms of a line: two stretches along it and a bend across it', () => {
  const modes = modeVectors(placeSkeleton(alike('L-2')));
  expect(modes.map(({ irrep }) => irrep)).toEqual(['Sigma_g+', 'Sigma_u+', 'Pi_u', 'Pi_u']);
  for (const { irrep, vectors } of modes)
    for (const [x, y, z] of vectors) expect(irrep.startsWith('Pi') ? z : Math.hypot(x, y)).toBeCloseTo(0, 8);
});

test('atoms in a frame of their own: trans-CoN4Cl2 turned about the axis (1, 1, 1)', () => {
  const turn = (v: Vector3): Vector3 => [v[2], v[0], v[1]];
  const places: [string, Vector3][] = [
    ['Co', [0, 0, 0]],
    ...([1.96, -1.96] as const).flatMap((d): [string, Vector3][] => [
      ['N', turn([d, 0, 0])],
      ['N', turn([0, d, 0])],
      ['Cl', turn([0, 0, d * 1.16])],
    ]),
  ];
  const found = vibrationsOfAtoms(places.map(([element, [x, y, z]]) => ({ element, x: x + 3, y: y - 1, z })));
  const { orientation } = found;
  expect(found.group).toBe('D4h');
  const modes = modeVectors({
    group: found.group,
    frame: [orientation.x, orientation.y, orientation.z],
    positions: found.coordinates.map(({ x, y, z }) => subtract([x, y, z], orientation.centre)),
    bonds: found.bonds!,
  });
  for (const { irrep, count } of found.vibrations) {
    const dimension = finiteGroup('D4h')!.irreps.find(({ label }) => label === irrep)!.dimension;
    expect(modes.filter((mode) => mode.irrep === irrep)).toHaveLength(count * dimension);
  }
  expect(modes).toHaveLength(15);
});

test('more atoms than can be drawn are refused', () => {
  const positions = Array.from({ length: 41 }, (_, i): Vector3 => [i, 0, i * i]);
  expect(() => modeVectors({ group: 'C1', frame: lineFrame([0, 0, 1]), positions, bonds: [] })).toThrow(
    /At most 40 atoms/,
  );
});
