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

const ring = (element: string, n: number, radius: number, z: number, turn = 0): Atom[] =>
  Array.from({ length: n }, (_, k) => {
    const angle = (2 * Math.PI * k) / n + turn;
    return { element, x: radius * Math.cos(angle), y: radius * Math.sin(angle), z };
  });

describe('beyond skeletons', () => {
  const iron: Atom = { element: 'Fe', x: 0, y: 0, z: 0 };
  const rings = (turn: number): Atom[] => [
    iron,
    ...ring('C', 5, 1.22, 1.66),
    ...ring('H', 5, 2.3, 1.66),
    ...ring('C', 5, 1.22, -1.66, turn),
    ...ring('H', 5, 2.3, -1.66, turn),
  ];

  // K. Nakamoto, Infrared and Raman Spectra of Inorganic and Coordination Compounds, Part B; from memory.
  test('ferrocene: D5h eclipsed, D5d staggered, D5 between; 57 vibrations; atoms by kind and place', () => {
    const staggered = vibrationsOfAtoms(rings(Math.PI / 5));
    expect([vibrationsOfAtoms(rings(0)).group, staggered.group]).toEqual(['D5h', 'D5d']);
    expect(vibrationsOfAtoms(rings(Math.PI / 10)).group).toBe('D5');
    const size = (label: string): number =>
      finiteGroup('D5d')!.irreps.find((irrep) => irrep.label === label)!.dimension;
    expect(staggered.vibrations.reduce((sum, { irrep, count }) => sum + count * size(irrep), 0)).toBe(57);
    expect(staggered.vibrations.find(({ irrep }) => irrep === 'A1g')).toMatchObject({ count: 4, raman: true });
    expect(staggered.orbits.map((orbit) => orbit.length)).toEqual([1, 10, 10]);
  });

  test('an icosahedron of twelve about one, and one atom of it of another kind', () => {
    const golden = (1 + Math.sqrt(5)) / 2;
    const vertices = [-1, 1].flatMap((a) =>
      [-golden, golden].flatMap((b) => [
        [0, a, b],
        [a, b, 0],
        [b, 0, a],
      ]),
    );
    const cluster = [[0, 0, 0], ...vertices].map(
      ([x, y, z], i): Atom => ({ element: i ? 'Au' : 'Pd', x: 1.5 * x!, y: 1.5 * y!, z: 1.5 * z! }),
    );
    expect(vibrationsOfAtoms(cluster).group).toBe('Ih');
    expect(vibrationsOfAtoms(cluster.with(1, { ...cluster[1]!, element: 'Ag' })).group).toBe('C5v');
  });

  test('axes are told in the frame given: z along the odd pair, x and y through the others', () => {
    const { orientation, axes } = vibrationsOfAtoms([
      { element: 'Co', x: 1, y: 1, z: 1 },
      ...[3, -1].map((x): Atom => ({ element: 'Cl', x, y: 1, z: 1 })),
      ...[3, -1].map((y): Atom => ({ element: 'N', x: 1, y, z: 1 })),
      ...[3, -1].map((z): Atom => ({ element: 'N', x: 1, y: 1, z })),
    ]);
    expect(Math.abs(orientation.z[0])).toBeCloseTo(1, 9);
    for (const [k, c] of [1, 1, 1].entries()) expect(orientation.centre[k]).toBeCloseTo(c, 9);
    expect(axes).toBe('Donors on the axes of the labels: 2 on x, 2 on y, 2 on z.');
  });

  test('an atom without a known radius leaves stretches open, and the rest stands', () => {
    const found = vibrationsOfAtoms(
      placesOf(findGeometry('OC-6')!).map(([x, y, z], i) => ({ element: i ? 'L' : 'M', x, y, z })),
    );
    expect(found).toMatchObject({ group: 'Oh', stretches: null, bends: null, bonds: null });
    expect(found.vibrations.map(({ irrep }) => irrep)).toEqual(['A1g', 'Eg', 'T2g', 'T1u', 'T2u']);
  });
});

test('refusals', () => {
  const refused = (atoms: Atom[], tolerance: number, code: string, field: string) =>
    expect(() => vibrationsOfAtoms(atoms, tolerance)).toThrowError(expect.objectContaining({ code, field }));
  const pair = ring('N', 2, 1, 0);
  refused([], 0.1, 'empty', 'coordinates');
  refused(pair.slice(1), 0.1, 'unsupported', 'coordinates');
  refused([...pair, pair[0]!], 0.1, 'out-of-range', 'coordinates');
  refused([{ ...pair[0]!, x: Number.NaN }, pair[1]!], 0.1, 'out-of-range', 'coordinates');
  refused(pair, 0, 'out-of-range', 'tolerance');
  refused(pair, 0.6, 'out-of-range', 'tolerance');
  refused(ring('C', 151, 100, 0), 0.1, 'too-large', 'coordinates');
  // A ring of nine has a ninefold axis.
  refused(ring('C', 9, 2.5, 0), 0.1, 'unsupported', 'coordinates');
});
