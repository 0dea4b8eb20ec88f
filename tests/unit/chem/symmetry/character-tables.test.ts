import { describe, expect, test } from 'vitest';
import { finiteGroup } from '#src/chem/symmetry/finite-group.ts';
import { finiteSymbols } from '#src/chem/symmetry/generators.ts';
import { findGroup, groups } from '#src/chem/symmetry/index.ts';

const sum = (values: readonly number[]): number => values.reduce((a, b) => a + b, 0);

/** Multiplicities and characters by label, for comparison with printed tables. */
function table(symbol: string): string[] {
  const group = findGroup(symbol)!;
  const head = group.classes.map(({ label, size }) => `${size === 1 ? '' : size}${label}`).join(' ');
  return [head, ...group.irreps.map(({ label, characters }) => `${label} ${characters.join(' ')}`)];
}

describe.each(finiteSymbols)('%s', (symbol) => {
  const group = finiteGroup(symbol)!;
  const inner = (a: readonly number[], b: readonly number[]): number =>
    sum(group.classes.map(({ size }, c) => size * a[c]! * b[c]!)) / group.order;

  test('classes fill the group and have labels of their own', () => {
    expect(sum(group.classes.map(({ size }) => size))).toBe(group.order);
    expect(groups.find((g) => g.symbol === symbol)?.order).toBe(group.order);
    expect(new Set(group.classes.map(({ label }) => label)).size).toBe(group.classes.length);
    for (const { size } of group.classes) expect(group.order % size).toBe(0);
  });

  test('irreps are orthogonal, and a complex pair has twice the norm', () => {
    for (const [i, a] of group.irreps.entries()) {
      for (const [j, b] of group.irreps.entries()) {
        const norm = i === j ? (a.pair ? 2 : 1) : 0;
        expect(Math.abs(inner(a.characters, b.characters) - norm)).toBeLessThan(1e-12);
      }
    }
  });

  test('squares of dimensions add up to the order, irreps match classes in number', () => {
    expect(sum(group.irreps.map(({ dimension, pair }) => (pair ? 2 : dimension ** 2)))).toBe(group.order);
    expect(sum(group.irreps.map(({ pair }) => (pair ? 2 : 1)))).toBe(group.classes.length);
    expect(new Set(group.irreps.map(({ label }) => label)).size).toBe(group.irreps.length);
  });

  test('the vector functions are found once each, in irreps that hold them', () => {
    const functions = group.irreps.flatMap((irrep) => irrep.functions);
    for (const name of ['x', 'y', 'z', 'Rx', 'Ry', 'Rz', 'xy', 'xz', 'yz']) {
      expect(functions.filter((f) => f === name)).toHaveLength(1);
    }
    expect(functions).toHaveLength(12);
    const vector = group.classes.map(({ representative: m }) => m[0][0] + m[1][1] + m[2][2]);
    for (const irrep of group.irreps) {
      const holds = inner(vector, irrep.characters) > 0.5;
      expect(irrep.functions.some((f) => ['x', 'y', 'z'].includes(f))).toBe(holds);
    }
  });
});

// F. A. Cotton, Chemical Applications of Group Theory, 3rd ed., 1990, appendix of character tables; from memory.
describe('printed tables', () => {
  test('Td', () => {
    expect(table('Td')).toEqual([
      'E 8C3 3C2 6S4 6sigma_d',
      'A1 1 1 1 1 1',
      'A2 1 1 1 -1 -1',
      'E 2 -1 2 0 0',
      'T1 3 0 -1 1 -1',
      'T2 3 0 -1 -1 1',
    ]);
  });

  test('D3h', () => {
    expect(table('D3h')).toEqual([
      "E 2C3 3C2' 2S3 sigma_h 3sigma_v",
      "A1' 1 1 1 1 1 1",
      "A2' 1 1 -1 1 1 -1",
      "E' 2 -1 0 -1 2 0",
      "A1'' 1 1 1 -1 -1 -1",
      "A2'' 1 1 -1 -1 -1 1",
      "E'' 2 -1 0 1 -2 0",
    ]);
  });

  test('C3 gives its complex pair as one label with real characters', () => {
    expect(table('C3')).toEqual(['E C3 C3^2', 'A 1 1 1', 'E 2 -1 -1']);
  });

  test('labels of irreps', () => {
    const labels = (symbol: string): string =>
      findGroup(symbol)!
        .irreps.map(({ label }) => label)
        .join(' ');
    expect(labels('Oh')).toBe('A1g A2g Eg T1g T2g A1u A2u Eu T1u T2u');
    expect(labels('D4h')).toBe('A1g A2g B1g B2g Eg A1u A2u B1u B2u Eu');
    expect(labels('D4d')).toBe('A1 A2 B1 B2 E1 E2 E3');
    expect(labels('D2h')).toBe('Ag B1g B2g B3g Au B1u B2u B3u');
    expect(labels('C5h')).toBe("A' E1' E2' A'' E1'' E2''");
    expect(labels('S6')).toBe('Ag Eg Au Eu');
    expect(labels('Th')).toBe('Ag Eg Tg Au Eu Tu');
    expect(labels('Ih')).toBe('Ag T1g T2g Gg Hg Au T1u T2u Gu Hu');
    expect(labels('Cinfv')).toBe('Sigma+ Sigma- Pi Delta Phi');
  });

  test('functions', () => {
    const functions = (symbol: string, label: string): string =>
      findGroup(symbol)!
        .irreps.find((irrep) => irrep.label === label)!
        .functions.join(' ');
    expect(functions('Oh', 'Eg')).toBe('2z2-x2-y2 x2-y2');
    expect(functions('Td', 'T2')).toBe('x y z xy xz yz');
    expect(functions('D4h', 'B1g')).toBe('x2-y2');
    expect(functions('D4h', 'B2g')).toBe('xy');
    expect(functions('C2v', 'B1')).toBe('x Ry xz');
    expect(functions('D2', 'B3')).toBe('x Rx yz');
    expect(functions('D2d', 'B2')).toBe('z xy');
    // The rotations of S8 lie in E3, not with x and y in E1: x turns by 45° under S8, Rx by 45° and its sign changes.
    expect(functions('S8', 'E1')).toBe('x y');
    expect(functions('S8', 'E3')).toBe('Rx Ry xz yz');
  });

  test('Ih has the golden ratio', () => {
    const group = findGroup('Ih')!;
    const fivefold = group.classes.findIndex(({ label }) => label === 'C5');
    const t1u = group.irreps.find(({ label }) => label === 'T1u')!;
    expect(t1u.characters[fivefold]).toBeCloseTo((1 + Math.sqrt(5)) / 2, 12);
  });

  test('the setting is told', () => {
    const setting = (symbol: string): string => findGroup(symbol)!.setting;
    expect(setting('D4h')).toBe('z is the principal axis, x a C2′');
    expect(setting('C4v')).toBe('z is the principal axis, xz a σv');
    expect(setting('Td')).toBe('x, y and z are S4 axes');
    expect(setting('Cs')).toBe('xy is the mirror');
  });

  test('an unknown symbol gives null', () => expect(findGroup('D9h')).toBeNull());
});
