import { describe, expect, test } from 'vitest';
import { findGeometry } from '#src/chem/geometry/index.ts';
import { determinant, type Matrix3, multiply, trace, type Vector3 } from '#src/chem/geometry/vector.ts';
import { permutingOperations } from '#src/chem/symmetry/permuting-operations.ts';
import { pointGroup, schoenflies } from '#src/chem/symmetry/point-group.ts';

/** The matrices that products of the generators make. */
function generate(generators: Matrix3[]): Matrix3[] {
  const same = (a: Matrix3, b: Matrix3) => a.every((row, i) => row.every((x, j) => Math.abs(x - b[i]![j]!) < 1e-6));
  const found = [...generators];
  for (let n = 0; n < found.length; n++) {
    for (const generator of generators) {
      const product = multiply(found[n]!, generator);
      if (!found.some((known) => same(known, product))) found.push(product);
    }
  }
  return found;
}

const rotationZ = (n: number): Matrix3 => {
  const [c, s] = [Math.cos((2 * Math.PI) / n), Math.sin((2 * Math.PI) / n)];
  return [
    [c, -s, 0],
    [s, c, 0],
    [0, 0, 1],
  ];
};
const diagonal = (x: number, y: number, z: number): Matrix3 => [
  [x, 0, 0],
  [0, y, 0],
  [0, 0, z],
];
const C2x = diagonal(1, -1, -1);
const sigmaXZ = diagonal(1, -1, 1);
const sigmaXY = diagonal(1, 1, -1);
const inversion = diagonal(-1, -1, -1);
const threefold: Matrix3 = [
  [0, 0, 1],
  [1, 0, 0],
  [0, 1, 0],
];

describe('groups made from their textbook generators are recognised', () => {
  test.each([1, 2, 3, 4, 5, 6, 7, 8])('n = %i', (n) => {
    const c = rotationZ(n);
    const s = multiply(sigmaXY, rotationZ(2 * n));
    expect(schoenflies(generate([c]))).toBe(`C${n}`);
    expect(schoenflies(generate([c, sigmaXY]))).toBe(n === 1 ? 'Cs' : `C${n}h`);
    expect(schoenflies(generate([c, sigmaXZ]))).toBe(n === 1 ? 'Cs' : `C${n}v`);
    expect(schoenflies(generate([s]))).toBe(n === 1 ? 'Ci' : `S${2 * n}`);
    if (n === 1) return;
    expect(schoenflies(generate([c, C2x]))).toBe(`D${n}`);
    expect(schoenflies(generate([c, C2x, sigmaXY]))).toBe(`D${n}h`);
    expect(schoenflies(generate([s, C2x]))).toBe(`D${n}d`);
  });

  test('cubic', () => {
    const s4 = multiply(sigmaXY, rotationZ(4));
    expect(schoenflies(generate([rotationZ(2), threefold]))).toBe('T');
    expect(schoenflies(generate([rotationZ(2), threefold, inversion]))).toBe('Th');
    expect(schoenflies(generate([s4, threefold]))).toBe('Td');
    expect(schoenflies(generate([rotationZ(4), threefold]))).toBe('O');
    expect(schoenflies(generate([rotationZ(4), threefold, inversion]))).toBe('Oh');
  });

  test('icosahedral, from a fivefold axis through a vertex (0, 1, φ)', () => {
    const phi = (1 + Math.sqrt(5)) / 2;
    const half: Matrix3 = [
      [1 / 2, -phi / 2, (phi - 1) / 2],
      [phi / 2, (phi - 1) / 2, -1 / 2],
      [(phi - 1) / 2, 1 / 2, phi / 2],
    ];
    expect(schoenflies(generate([half, threefold]))).toBe('I');
    expect(schoenflies(generate([half, threefold, inversion]))).toBe('Ih');
  });
});

/** Another road for six donors on the axes: the 48 signed permutations, tried on coordinates, and counts of elements. */
function groupByCounting(colours: string[], links: [number, number][]): string {
  const vertices = findGeometry('OC-6')!.vertices;
  const key = (v: Vector3) => v.map((x) => Math.round(x)).join();
  const colourAt = new Map(vertices.map((v, i) => [key(v), colours[i]]));
  const middle = (a: Vector3, b: Vector3) => a.map((x, k) => Math.round(x + b[k]!)).join();
  const linkAt = new Set(links.map(([i, j]) => middle(vertices[i]!, vertices[j]!)));
  const image = (m: Matrix3, text: string) => {
    const v = text.split(',').map(Number);
    return m.map((row) => Math.round(row.reduce((sum, x, k) => sum + x * v[k]!, 0)) + 0).join();
  };
  const kept = signedPermutations().filter(
    (m) =>
      [...colourAt].every(([place, colour]) => colourAt.get(image(m, place)) === colour) &&
      [...linkAt].every((place) => linkAt.has(image(m, place))),
  );
  const rotations = kept.filter((m) => determinant(m) > 0).length;
  const mirrors = kept.filter((m) => determinant(m) < 0 && trace(m) === 1).length;
  const centre = kept.some((m) => trace(m) === -3);
  return known[`${kept.length} ${rotations} ${mirrors} ${centre}`]!;
}

function signedPermutations(): Matrix3[] {
  const orders = [
    [0, 1, 2],
    [1, 2, 0],
    [2, 0, 1],
    [0, 2, 1],
    [2, 1, 0],
    [1, 0, 2],
  ];
  return orders.flatMap((order) =>
    Array.from({ length: 8 }, (_, signs): Matrix3 => {
      const row = (r: number): Vector3 =>
        [0, 1, 2].map((k) => (order[r] === k ? ((signs >> r) & 1 ? -1 : 1) : 0)) as Vector3;
      return [row(0), row(1), row(2)];
    }),
  );
}

/** Order, rotations, mirror planes, centre: enough to tell the groups that six donors can have (from the tables). */
const known: Record<string, string> = {
  '48 24 9 true': 'Oh',
  '16 8 5 true': 'D4h',
  '8 4 4 false': 'C4v',
  '8 4 3 true': 'D2h',
  '4 2 2 false': 'C2v',
  '6 3 3 false': 'C3v',
  '6 6 0 false': 'D3',
  '3 3 0 false': 'C3',
  '2 2 0 false': 'C2',
  '4 2 1 true': 'C2h',
  '2 1 1 false': 'Cs',
  '2 1 0 true': 'Ci',
  '1 1 0 false': 'C1',
};

test('every colouring of the octahedron by three kinds has the group that counting its elements gives', () => {
  const vertices = findGeometry('OC-6')!.vertices;
  const operations = permutingOperations(vertices);
  for (let code = 0; code < 3 ** 6; code++) {
    const colours = vertices.map((_, i) => 'abc'[Math.floor(code / 3 ** i) % 3]!);
    expect(pointGroup(operations, { colours, links: [] }, false)).toBe(groupByCounting(colours, []));
  }
});

test.each<[string, string, [number, number][]]>([
  [
    'aaaaaa',
    'D3',
    [
      [0, 2],
      [1, 4],
      [3, 5],
    ],
  ],
  [
    'aaaaaa',
    'D2h',
    [
      [2, 4],
      [3, 5],
    ],
  ],
  [
    'aaaaaa',
    'C2',
    [
      [0, 2],
      [1, 4],
    ],
  ],
  ['aaaaaa', 'C2v', [[2, 4]]],
  [
    'ababab',
    'C3',
    [
      [0, 5],
      [1, 2],
      [3, 4],
    ],
  ],
  [
    'bbaacc',
    'C2h',
    [
      [2, 4],
      [3, 5],
    ],
  ],
])('%s with chelates is %s by both roads', (kinds, group, links) => {
  const operations = permutingOperations(findGeometry('OC-6')!.vertices);
  expect(pointGroup(operations, { colours: [...kinds], links }, false)).toBe(group);
  expect(groupByCounting([...kinds], links)).toBe(group);
});

test('points on a line have the infinite groups', () => {
  const line: Vector3[] = [
    [0, 0, 1],
    [0, 0, -1],
  ];
  const operations = permutingOperations(line);
  expect(pointGroup(operations, { colours: ['a', 'a'], links: [] }, true)).toBe('Dinfh');
  expect(pointGroup(operations, { colours: ['a', 'b'], links: [] }, true)).toBe('Cinfv');
});

test('points in a plane keep its reflection', () => {
  const operations = permutingOperations(findGeometry('SP-4')!.vertices);
  expect(operations).toHaveLength(16);
  expect(pointGroup(operations, { colours: ['a', 'b', 'c', 'd'], links: [] }, false)).toBe('Cs');
});
