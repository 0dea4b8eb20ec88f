import { describe, expect, test } from 'vitest';
import { operationsOf, transPairs } from '#src/chem/geometry/catalogue.ts';
import { findGeometry, geometries } from '#src/chem/geometry/index.ts';
import { dot, length } from '#src/chem/geometry/vector.ts';

/** IUPAC Red Book 2005, tables IR-9.2 and IR-9.3 (CN 9 from memory); the group is that of the plain skeleton. */
const table = `
  L-2 Dinfh, A-2 C2v, TP-3 D3h, TPY-3 C3v, TS-3 C2v, T-4 Td, SP-4 D4h, SPY-4 C4v, SS-4 C2v, TBPY-5 D3h, SPY-5 C4v,
  OC-6 Oh, TPR-6 D3h, PBPY-7 D5h, OCF-7 C3v, TPRS-7 C2v, CU-8 Oh, SAPR-8 D4d, DD-8 D2d, HBPY-8 D6h, OCT-8 D3d,
  TPRT-8 D3h, TPRS-8 C2v, TPRS-9 D3h, HBPY-9 D7h`
  .trim()
  .split(/,\s*/)
  .map((entry) => entry.split(' ') as [string, string]);

test('lists the polyhedral symbols of IUPAC and no others', () => {
  expect(geometries.map(({ symbol }) => symbol)).toEqual(table.map(([symbol]) => symbol));
});

test.each(table)('%s has the group %s, found from its vertices', (symbol, group) => {
  expect(findGeometry(symbol)?.group).toBe(group);
});

describe.each(geometries)('$symbol', (geometry) => {
  const { symbol, vertices, edges, chelateEdges, coordinationNumber } = geometry;

  test('has unit vectors, as many as its symbol says, none on another', () => {
    expect(coordinationNumber).toBe(Number(symbol.split('-')[1]));
    expect(vertices).toHaveLength(coordinationNumber);
    for (const vertex of vertices) expect(length(vertex)).toBeCloseTo(1, 12);
    for (const [n, a] of vertices.entries()) {
      for (const b of vertices.slice(n + 1)) expect(dot(a, b)).toBeLessThan(0.75);
    }
  });

  test('keeps its edges under every operation', () => {
    const keys = new Set(edges.map(([i, j]) => `${i} ${j}`));
    for (const { permutation } of operationsOf(geometry)) {
      for (const [i, j] of edges) {
        const [a, b] = [permutation[i]!, permutation[j]!];
        expect(keys).toContain(`${Math.min(a, b)} ${Math.max(a, b)}`);
      }
    }
  });

  test('lets no chelate span opposite donors', () => {
    for (const [i, j] of chelateEdges) expect(dot(vertices[i]!, vertices[j]!)).toBeGreaterThan(-0.7);
  });
});

test('edges are those of the solids: Euler counts, by hand', () => {
  const counts = { 'T-4': 6, 'SP-4': 4, 'TBPY-5': 9, 'SPY-5': 8, 'OC-6': 12, 'TPR-6': 9, 'PBPY-7': 15, 'CU-8': 12 };
  for (const [symbol, count] of Object.entries(counts)) expect(findGeometry(symbol)?.edges).toHaveLength(count);
  expect(findGeometry('SAPR-8')?.edges).toHaveLength(16);
  expect(findGeometry('DD-8')?.edges).toHaveLength(18);
  expect(findGeometry('TPRS-9')?.edges).toHaveLength(21);
  expect(findGeometry('L-2')?.chelateEdges).toEqual([]);
});

test('the octahedron stands on the axes, so that ligands of D4h and C4v lie on x and y', () => {
  expect(findGeometry('OC-6')?.vertices).toEqual([
    [0, 0, 1],
    [0, 0, -1],
    [1, 0, 0],
    [-1, 0, 0],
    [0, 1, 0],
    [0, -1, 0],
  ]);
  expect(transPairs(findGeometry('OC-6')!)).toEqual([
    [0, 1],
    [2, 3],
    [4, 5],
  ]);
});

test('the diagonals of a square are trans, in pyramids too', () => {
  expect(transPairs(findGeometry('SP-4')!)).toHaveLength(2);
  expect(transPairs(findGeometry('SPY-5')!)).toHaveLength(2);
});

test('an unknown symbol has no geometry', () => {
  expect(findGeometry('OC-7')).toBeNull();
  expect(findGeometry('')).toBeNull();
});
