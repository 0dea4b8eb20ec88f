import { describe, expect, test } from 'vitest';
import { operationsOf } from '#src/chem/geometry/catalogue.ts';
import { findGeometry, type Geometry, geometries } from '#src/chem/geometry/index.ts';
import { apply, cross, type Matrix3, multiply, type Vector3 } from '#src/chem/geometry/vector.ts';
import { embeddings } from '#src/chem/symmetry/embedding.ts';
import { finiteGroup } from '#src/chem/symmetry/finite-group.ts';
import { type Atom, vibrationsOfAtoms } from '#src/chem/symmetry/from-coordinates/index.ts';
import { vibrations } from '#src/chem/symmetry/index.ts';
import { rotation } from '#src/chem/symmetry/matrices.ts';
import { schoenflies } from '#src/chem/symmetry/point-group.ts';

/** Bond length of every skeleton here, in Å. */
const BOND = 2;

/** Numbers from 0 to 1, the same ones for the same seed (Park and Miller's generator). */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

const placesOf = ({ vertices }: Geometry): Vector3[] => [
  [0, 0, 0],
  ...vertices.map(([x, y, z]): Vector3 => [BOND * x, BOND * y, BOND * z]),
];
const atomsAt = (places: readonly Vector3[]): Atom[] =>
  places.map(([x, y, z], i) => ({ element: i === 0 ? 'Co' : 'N', x, y, z }));
const moved = (places: readonly Vector3[], by: readonly Vector3[]): Vector3[] =>
  places.map((p, i): Vector3 => [p[0] + by[i]![0], p[1] + by[i]![1], p[2] + by[i]![2]]);

describe.each(geometries)('$symbol', (geometry) => {
  const places = placesOf(geometry);
  const ideal = vibrations({ geometry: geometry.symbol, sites: geometry.vertices.map(() => 'N') });

  test('unmoved, in any frame: group and labels of the ideal skeleton', () => {
    const random = seeded(7);
    for (let round = 0; round < 4; round++) {
      const turn = round === 0 ? null : rotation([random() - 0.5, random() - 0.5, random() - 0.5], 6 * random());
      const shift: Vector3 = [10 * random(), -5 * random(), random()];
      const placed = places.map((p) => (turn ? apply(turn, p) : p));
      const found = vibrationsOfAtoms(
        atomsAt(
          moved(
            placed,
            placed.map(() => shift),
          ),
        ),
      );
      expect(found.group).toBe(geometry.group);
      expect(found.vibrations).toEqual(ideal.vibrations);
      expect(found.total).toEqual(ideal.total);
      expect(found.permutation).toEqual(ideal.permutation);
      expect(found.deviation.largest).toBeLessThan(1e-8);
    }
  });

  test('with every coordinate jittered by up to 0.05 Å: the same group, and no more labels than before', () => {
    const random = seeded(20261201);
    for (let round = 0; round < 12; round++) {
      const jitter = places.map((): Vector3 => [0.1 * random() - 0.05, 0.1 * random() - 0.05, 0.1 * random() - 0.05]);
      const found = vibrationsOfAtoms(atomsAt(moved(places, jitter)));
      expect(found.group).toBe(geometry.group);
      expect(found.vibrations).toEqual(ideal.vibrations);
      expect(found.deviation.rms).toBeLessThan(0.085);
    }
  });

  const linear = geometry.vertices.length === 2 && geometry.group === 'Dinfh';
  if (linear) return;
  test('distorted by 0.3 Å along each symmetry mode: the operations that leave the mode alone', () => {
    const matrices = operationsOf(geometry).map(({ matrix }) => matrix);
    let lower = 0;
    for (const { irrep, displacement } of symmetryModes(geometry, matrices)) {
      const kept = matrices.filter((m) => leaves(m, places, displacement));
      const found = vibrationsOfAtoms(atomsAt(moved(places, displacement)));
      if (becomesFlat(geometry, displacement)) expect(found.group).toBe('D4h');
      else if (matrices.some((m) => !kept.includes(m) && nearlyLeaves(m, places, displacement))) {
        // Between two directions of an E mode that higher groups keep, both may lie within the tolerance.
        expect(finiteGroup(found.group)!.order % kept.length, irrep).toBe(0);
      } else {
        expect(found.group, irrep).toBe(schoenflies(kept));
        if (kept.length < matrices.length) lower++;
      }
    }
    expect(lower).toBeGreaterThan(0);
  });
});

/**
 * Displacements of atoms that belong to one irrep each: the projection of every atom's step along x, y and z, less
 * translation and rotation, the atom that moves most by 0.3 Å.
 */
function symmetryModes(geometry: Geometry, matrices: readonly Matrix3[]): { irrep: string; displacement: Vector3[] }[] {
  const places = placesOf(geometry);
  const group = finiteGroup(geometry.group)!;
  const [setting] = embeddings(group, matrices);
  const rigid = orthonormal([
    ...[0, 1, 2].map((k) => places.flatMap(() => unit(k))),
    ...[0, 1, 2].map((k) => places.flatMap((p) => cross(unit(k), p))),
  ]);
  const modes: { irrep: string; displacement: Vector3[] }[] = [];
  const seen = new Set<string>();
  const pairs = matrices.filter(
    (m) => matrices.filter((n) => near(multiply(m, n)[0], unit(0)) && near(multiply(m, n)[1], unit(1)))[0] === m,
  );
  const involutions = pairs.flatMap((m): [Matrix3, 1 | -1][] => [
    [m, 1],
    [m, -1],
  ]);
  for (const { label, characters } of group.irreps) {
    for (const [atom] of places.entries()) {
      for (const k of [0, 1, 2]) {
        const start = places.map((_, i): Vector3 => (i === atom ? unit(k) : [0, 0, 0]));
        const projected = places.map((): Vector3 => [0, 0, 0]);
        setting!.images.forEach((m, g) => {
          const character = characters[group.classOfMatrix(group.operations[g]!)!]!;
          carried(m, places, start).forEach((v, i) => {
            for (const c of [0, 1, 2] as const) projected[i]![c] += character * v[c];
          });
        });
        const inner = without(projected.flat(), rigid);
        const vectors = places.map((_, i) => inner.slice(3 * i, 3 * i + 3) as Vector3);
        // Partners that a half-turn or mirror keeps or reverses are those that higher groups keep.
        for (const [h, sign] of involutions) {
          const adapted = carried(h, places, vectors).map(
            (v, i): Vector3 => [
              vectors[i]![0] + sign * v[0],
              vectors[i]![1] + sign * v[1],
              vectors[i]![2] + sign * v[2],
            ],
          );
          const most = Math.max(...adapted.map((v) => Math.hypot(...v)));
          if (most < 1e-6) continue;
          const displacement = adapted.map(
            (v): Vector3 => [(0.3 * v[0]) / most, (0.3 * v[1]) / most, (0.3 * v[2]) / most],
          );
          // One of each set that the operations carry into each other.
          if (seen.has(keyOf(displacement))) continue;
          for (const m of matrices) seen.add(keyOf(carried(m, places, displacement)));
          modes.push({ irrep: label, displacement });
        }
      }
    }
  }
  return modes;
}

/** A square pyramid with the metal at the apex is planar within the tolerance when its A1 mode takes 0.3 Å off its height of 0.5 Å. */
const becomesFlat = ({ symbol, vertices }: Geometry, by: readonly Vector3[]): boolean =>
  symbol === 'SPY-4' && by.slice(1).every(([, , z]) => Math.abs(BOND * vertices[0]![2] + z - by[0]![2]) < 0.15);

/** Whether a displacement is within the tolerance of one that an operation leaves alone: half of what it changes. */
function nearlyLeaves(m: Matrix3, places: readonly Vector3[], by: readonly Vector3[]): boolean {
  const squares = carried(m, places, by).map(
    (v, i) => (v[0] - by[i]![0]) ** 2 + (v[1] - by[i]![1]) ** 2 + (v[2] - by[i]![2]) ** 2,
  );
  return Math.sqrt(squares.reduce((sum, x) => sum + x, 0) / places.length) / 2 < 0.085;
}

const keyOf = (by: readonly Vector3[]): string =>
  by
    .flat()
    .map((x) => Math.round(1e4 * x) || 0)
    .join();
const unit = (k: number): Vector3 => [Number(k === 0), Number(k === 1), Number(k === 2)];
const near = (a: Vector3, b: Vector3): boolean => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]) < 1e-4;
const dot = (a: readonly number[], b: readonly number[]): number => a.reduce((sum, x, i) => sum + x * b[i]!, 0);

function carried(m: Matrix3, places: readonly Vector3[], by: readonly Vector3[]): Vector3[] {
  const images = by.map((): Vector3 => [0, 0, 0]);
  places.forEach((p, i) => {
    images[places.findIndex((q) => near(q, apply(m, p)))] = apply(m, by[i]!);
  });
  return images;
}

const leaves = (m: Matrix3, places: readonly Vector3[], by: readonly Vector3[]): boolean =>
  carried(m, places, by).every((v, i) => near(v, by[i]!));

function without(vector: number[], basis: readonly number[][]): number[] {
  return basis.reduce((left, b) => left.map((x, i) => x - dot(left, b) * b[i]!), vector);
}

function orthonormal(vectors: readonly number[][]): number[][] {
  const basis: number[][] = [];
  for (const vector of vectors) {
    const left = without(vector, basis);
    const size = Math.sqrt(dot(left, left));
    if (size > 1e-6) basis.push(left.map((x) => x / size));
  }
  return basis;
}

test('a line: jittered, stretched to one side, bent, and of two kinds', () => {
  const line = placesOf(findGeometry('L-2')!);
  const group = (by: Vector3[], atoms = atomsAt(moved(line, by))): string => vibrationsOfAtoms(atoms).group;
  expect(
    group([
      [0.04, -0.05, 0.02],
      [0.05, 0.03, 0],
      [-0.02, 0.05, -0.05],
    ]),
  ).toBe('Dinfh');
  expect(
    group([
      [0, 0, 0.3],
      [0, 0, 0],
      [0, 0, 0],
    ]),
  ).toBe('Cinfv');
  expect(
    group([
      [0.3, 0, 0],
      [-0.15, 0, 0],
      [-0.15, 0, 0],
    ]),
  ).toBe('C2v');
  const two: Atom[] = [
    { element: 'C', x: 0, y: 0, z: 0 },
    { element: 'O', x: 1.1, y: 0.1, z: 0 },
  ];
  const carbonMonoxide = vibrationsOfAtoms(two);
  expect(carbonMonoxide.group).toBe('Cinfv');
  expect(carbonMonoxide.vibrations).toEqual([{ irrep: 'Sigma+', count: 1, infrared: true, raman: true }]);
  // Ethyne: 3 Σ and 2 Π modes (G. Herzberg, Infrared and Raman Spectra, 1945; from memory).
  const ethyne = [-1.66, -0.6, 0.6, 1.66].map((x, i): Atom => ({ element: i % 3 === 0 ? 'H' : 'C', x, y: 1, z: 2 }));
  expect(vibrationsOfAtoms(ethyne).vibrations.map(({ irrep, count }) => `${count}${irrep}`)).toEqual([
    '2Sigma_g+',
    '1Pi_g',
    '1Sigma_u+',
    '1Pi_u',
  ]);
});
