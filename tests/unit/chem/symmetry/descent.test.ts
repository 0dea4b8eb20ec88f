import { describe, expect, test } from 'vitest';
import { descend, directProduct, findGroup, groups, type IrrepCount } from '#src/chem/symmetry/index.ts';

const written = (terms: readonly IrrepCount[]): string =>
  terms.map(({ irrep, count }) => `${count === 1 ? '' : count}${irrep}`).join(' + ');
const of = (from: string, to: string, irrep: string, along?: string): string =>
  written(descend(from, to, [irrep], along).maps[0]!.terms);

const parents = ['Oh', 'Td', 'Th', 'D4h', 'D6h', 'D4d', 'D6d', 'D3h', 'D8h', 'C6v', 'S8', 'Dinfh', 'Cinfv'];

describe.each(parents)('from %s', (from) => {
  const { order, irreps } = findGroup(from)!;
  const found = groups.flatMap(({ symbol }) => {
    try {
      return [{ symbol, ...descend(from, symbol) }];
    } catch {
      return [];
    }
  });

  test('C1 and the group itself are subgroups; orders divide', () => {
    const symbols = found.map(({ symbol }) => symbol);
    expect(symbols).toEqual(expect.arrayContaining(['C1', from]));
    for (const { symbol } of found) {
      const own = findGroup(symbol)!.order;
      if (order !== null && own !== null) expect(order % own).toBe(0);
    }
  });

  test('every choice keeps dimensions, the totally symmetric irrep, and products', () => {
    for (const { symbol, choices } of found) {
      const group = findGroup(symbol)!;
      const dimension = (label: string): number => group.irreps.find((irrep) => irrep.label === label)?.dimension ?? 2;
      expect(new Set(choices).size).toBe(choices.length);
      for (const along of choices) {
        const { maps, along: answered } = descend(from, symbol, undefined, along);
        expect(answered).toBe(along);
        maps.forEach(({ terms }, i) => {
          const size = terms.reduce((sum, { irrep, count }) => sum + count * dimension(irrep), 0);
          expect(size).toBe(irreps[i]!.dimension);
        });
        expect(maps[0]!.terms).toEqual([{ irrep: group.irreps[0]!.label, count: 1 }]);
      }
    }
  });

  test('an irrep comes back as itself in its own group', () => {
    for (const { irrep, terms } of descend(from, from).maps) expect(terms).toEqual([{ irrep, count: 1 }]);
  });
});

test('restricting a product is multiplying restrictions', () => {
  const labels = findGroup('Oh')!.irreps.map(({ label }) => label);
  const tally = (terms: readonly IrrepCount[]): Record<string, number> => {
    const sums: Record<string, number> = {};
    for (const { irrep, count } of terms) sums[irrep] = (sums[irrep] ?? 0) + count;
    return sums;
  };
  const down = (terms: readonly IrrepCount[]): IrrepCount[] =>
    terms.flatMap(({ irrep, count }) =>
      descend('Oh', 'D4h', [irrep]).maps[0]!.terms.map((term) => ({ ...term, count: term.count * count })),
    );
  for (const a of labels) {
    const after = down(directProduct('Oh', [a, 'T2g']));
    const before = down([{ irrep: a, count: 1 }]).flatMap((left) =>
      down([{ irrep: 'T2g', count: 1 }]).flatMap((right) => directProduct('D4h', [left.irrep, right.irrep])),
    );
    expect(tally(after)).toEqual(tally(before));
  }
});

// Wilson, Decius and Cross, Molecular Vibrations, 1955, correlation tables; from memory.
describe('printed correlations', () => {
  test('D4h to D2h through either set of axes', () => {
    expect(descend('D4h', 'D2h').choices).toEqual(["C2', sigma_v", "C2'', sigma_d"]);
    expect(of('D4h', 'D2h', 'B1g')).toBe('Ag');
    expect(of('D4h', 'D2h', 'B1g', "C2''")).toBe('B1g');
    expect(of('D4h', 'D2h', 'B2g', "C2''")).toBe('Ag');
  });

  test('Oh to D3d, Td to C3v, D3h to C2v', () => {
    expect(of('Oh', 'D3d', 'T2g')).toBe('A1g + Eg');
    expect(of('Oh', 'D3d', 'T1u')).toBe('A2u + Eu');
    expect(of('Td', 'C3v', 'T2')).toBe('A1 + E');
    expect(of('D3h', 'C2v', "E'")).toBe('A1 + B2');
  });

  test('linear groups', () => {
    expect(of('Dinfh', 'D4h', 'Delta_g')).toBe('B1g + B2g');
    expect(of('Dinfh', 'Cinfv', 'Pi_u')).toBe('Pi');
    expect(of('Dinfh', 'D2h', 'Sigma_u+')).toBe('B1u');
  });
});

test('refusals', () => {
  expect(() => descend('D4h', 'D3h')).toThrowError(expect.objectContaining({ code: 'unsupported', field: 'to' }));
  expect(() => descend('D4h', 'D2h', ['A1g'], 'C5')).toThrowError(
    expect.objectContaining({ code: 'out-of-range', field: 'along' }),
  );
  expect(() => descend('Oh', 'D4h', ['A1'])).toThrowError(
    expect.objectContaining({ code: 'unknown-symbol', field: 'irreps' }),
  );
  expect(() => descend('Cinfv', 'D2h')).toThrowError(expect.objectContaining({ code: 'unsupported' }));
});
