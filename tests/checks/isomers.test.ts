import { describe, expect, test } from 'vitest';
import { transPairs } from '#src/chem/geometry/catalogue.ts';
import { countIsomers, enumerateIsomers, findGeometry, type Isomer, type LigandSlot } from '#src/chem/geometry/index.ts';
import file from './isomers.json';

interface ExpectedIsomer {
  pointGroup: string;
  chiral: boolean;
  transPairs?: string[];
  axial?: string[];
  apical?: string;
  label?: string;
}

const symbols: Record<string, string> = {
  linear: 'L-2',
  'trigonal planar': 'TP-3',
  tetrahedral: 'T-4',
  'square planar': 'SP-4',
  'trigonal bipyramidal': 'TBPY-5',
  'square pyramidal': 'SPY-5',
  octahedral: 'OC-6',
  'trigonal prismatic': 'TPR-6',
  'pentagonal bipyramidal': 'PBPY-7',
  cubic: 'CU-8',
  'square antiprismatic': 'SAPR-8',
};

/** Ligand slots of a record; chelate chains that read alike, from either end, are one ligand. */
function slotsOf(donors: readonly string[], chelates: readonly (readonly string[])[]): LigandSlot[] {
  const tally = new Map<string, LigandSlot>();
  const count = (pattern: readonly string[]) => {
    const key = [pattern.join(' '), [...pattern].reverse().join(' ')].sort()[0]!;
    const slot = tally.get(key) ?? { label: key.replaceAll(' ', ''), pattern: key.split(' '), count: 0 };
    tally.set(key, { ...slot, count: slot.count + 1 });
  };
  for (const donor of donors) count([donor]);
  for (const chain of chelates) count(chain);
  return [...tally.values()];
}

const sortedPair = (a: string, b: string): string => [a, b].sort().join('-');

/** What a record tells of an isomer, read off ours: a record that tells less is compared in less. */
function told(symbol: string, isomer: Isomer, expected: ExpectedIsomer): string {
  const pairs = transPairs(findGeometry(symbol)!).map(([i, j]) => sortedPair(isomer.sites[i]!, isomer.sites[j]!));
  return JSON.stringify({
    pointGroup: isomer.pointGroup,
    chiral: isomer.chiral,
    ...(expected.transPairs && { trans: pairs.sort() }),
    ...(expected.axial && { axial: isomer.sites.slice(0, 2).sort() }),
    ...(expected.apical && { apical: isomer.sites[0] }),
  });
}

function toldBy({ pointGroup, chiral, transPairs: pairs, axial, apical }: ExpectedIsomer): string {
  return JSON.stringify({
    pointGroup,
    chiral,
    ...(pairs && { trans: pairs.map((pair) => sortedPair(...(pair.split('-') as [string, string]))).sort() }),
    ...(axial && { axial: [...axial].sort() }),
    ...(apical && { apical }),
  });
}

/** Mirror images stand side by side; the records list each pair once. */
const formsOf = (isomers: readonly Isomer[]): Isomer[] => {
  const forms: Isomer[] = [];
  for (let n = 0; n < isomers.length; n += isomers[n]!.chiral ? 2 : 1) forms.push(isomers[n]!);
  return forms;
};

describe.each(file.records)('$id $formula $geometry', ({ geometry, donors, chelates, expect: published, source }) => {
  const symbol = symbols[geometry]!;
  const request = { geometry: symbol, ligands: slotsOf(donors, chelates) };
  const list = enumerateIsomers(request);
  const expected: ExpectedIsomer[] = published.isomers;

  test('counts, by orbits and by Burnside', () => {
    expect(list.count, source).toBe(published.stereoisomers);
    expect(countIsomers(request), source).toBe(published.stereoisomers);
    expect(list.enantiomericPairs, source).toBe(published.enantiomericPairs);
    expect(formsOf(list.isomers), source).toHaveLength(published.diastereoisomers);
  });

  test('point groups, chirality and who faces whom', () => {
    const ours = formsOf(list.isomers).map((isomer) => told(symbol, isomer, expected[0]!));
    expect(ours.sort(), source).toEqual(expected.map(toldBy).sort());
  });
});

const named = file.records.flatMap((record) => {
  const isomers: ExpectedIsomer[] = record.expect.isomers;
  return isomers.flatMap((form) => (form.label ? [{ ...record, form, label: form.label }] : []));
});

test.each(named)('$id $formula: the $label form is called so', ({ geometry, donors, chelates, form, label, source }) => {
  const symbol = symbols[geometry]!;
  const { isomers } = enumerateIsomers({ geometry: symbol, ligands: slotsOf(donors, chelates) });
  const ours = formsOf(isomers).filter(({ descriptor }) => descriptor === label);
  expect(
    ours.map((isomer) => told(symbol, isomer, form)),
    source,
  ).toEqual([toldBy(form)]);
});
