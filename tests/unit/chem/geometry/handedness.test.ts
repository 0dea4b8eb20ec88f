import { describe, expect, test } from 'vitest';
import { skewLineChirality } from '#src/chem/geometry/handedness.ts';
import { enumerateIsomers, findGeometry, type Isomer } from '#src/chem/geometry/index.ts';
import { cross, dot, normalise, scale, subtract, type Vector3 } from '#src/chem/geometry/vector.ts';

const octahedron = findGeometry('OC-6')!;
const tris = enumerateIsomers({ geometry: 'OC-6', ligands: [{ label: 'A', donors: 2, count: 3 }] }).isomers;

/**
 * Another road to the hand of a tris(chelate). Seen down its threefold axis, a right-handed helix turns clockwise as
 * it goes away from the eye, from either end: Δ (IUPAC Red Book 2005, IR-9.3.4.11; common practice).
 */
function hand({ chelates }: Isomer): 'Δ' | 'Λ' {
  const { vertices } = octahedron;
  const axes: Vector3[] = [-1, 1].flatMap((x) => [-1, 1].flatMap((y) => [-1, 1].map((z): Vector3 => [x, y, z])));
  const towardsEye = axes
    .map(normalise)
    .find((axis) => chelates.every(([i, j]) => dot(axis, vertices[i]!) * dot(axis, vertices[j]!) < 0))!;
  const turns = chelates.map((pair) => {
    const [near, far] = [...pair]
      .map((vertex) => vertices[vertex]!)
      .sort((a, b) => dot(b, towardsEye) - dot(a, towardsEye)) as [Vector3, Vector3];
    const flat = (v: Vector3) => subtract(v, scale(towardsEye, dot(v, towardsEye)));
    return Math.sign(dot(cross(flat(near), flat(far)), towardsEye));
  });
  expect(new Set(turns).size).toBe(1);
  return turns[0]! < 0 ? 'Δ' : 'Λ';
}

test('a tris(chelate) is Δ where its blades recede clockwise', () => {
  expect(tris.map(({ chirality }) => chirality)).toEqual(['Λ', 'Δ']);
  for (const isomer of tris) expect(isomer.chirality).toBe(hand(isomer));
});

test('taking one chelate from a Δ tris(chelate) leaves a Δ cis-bis(chelate)', () => {
  const { chelates } = tris.find(({ chirality }) => chirality === 'Δ')!;
  for (const gone of chelates) {
    const rest = chelates.filter((pair) => pair !== gone);
    expect(skewLineChirality(octahedron, rest)).toBe('Δ');
    expect(
      skewLineChirality(
        octahedron,
        [...rest].reverse().map(([i, j]) => [j, i]),
      ),
    ).toBe('Δ');
  }
});

test('the rule done by hand: edges from +z to +x and from −z to +y', () => {
  // u = (1, 0, −1), v = (0, −1, −1) after turning it round, d = (−½, ½, −1): d·(u×v) = ½ + ½ + 1 > 0, so Λ
  expect(
    skewLineChirality(octahedron, [
      [0, 2],
      [1, 4],
    ]),
  ).toBe('Λ');
});

describe('null', () => {
  test.each<[string, [number, number][]]>([
    ['without chelates', []],
    ['with one', [[0, 2]]],
    [
      'with parallel edges, as in trans-bis(chelates)',
      [
        [2, 4],
        [3, 5],
      ],
    ],
    [
      'where pairs disagree',
      [
        [0, 2],
        [0, 4],
        [1, 3],
        [3, 4],
      ],
    ],
  ])('%s', (_, chelates) => {
    expect(skewLineChirality(octahedron, chelates)).toBeNull();
  });

  test('in achiral isomers, and in chiral ones without chelates', () => {
    const { isomers } = enumerateIsomers({
      geometry: 'OC-6',
      ligands: ['A', 'B', 'C'].map((label) => ({ label, donors: 1, count: 2 })),
    });
    for (const { chirality } of isomers) expect(chirality).toBeNull();
    expect(isomers.filter(({ chiral }) => chiral)).toHaveLength(2);
  });

  test('outside the octahedron, where the convention names other lines', () => {
    const { isomers } = enumerateIsomers({ geometry: 'SAPR-8', ligands: [{ label: 'A', donors: 2, count: 4 }] });
    expect(new Set(isomers.map(({ chirality }) => chirality))).toEqual(new Set([null]));
  });
});
