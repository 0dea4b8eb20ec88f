import { describe, expect, test } from 'vitest';
import {
  antisymmetricPower,
  descend,
  directProduct,
  dOrbitals,
  findGroup,
  type IrrepCount,
  type Skeleton,
  selectionAnalysis,
  splitTerm,
  symmetricPower,
  type Vibration,
  vibrations,
} from '#src/chem/symmetry/index.ts';
import file from './symmetry.json';

type Sum = Record<string, number>;
interface Polarisation {
  product: Sum;
  dipoleAllowed: boolean;
  promotingModes?: string[];
  vibronicallyAllowed?: boolean;
}
interface CheckRecord {
  id: string;
  kind: string;
  group: string;
  source: string;
  note?: string;
  ungraded?: string[];
}

const records = file.records as unknown as CheckRecord[];
const ofKind = <T extends object>(kind: string) => records.filter((r) => r.kind === kind) as (CheckRecord & T)[];
const sum = (terms: readonly IrrepCount[]): Sum => Object.fromEntries(terms.map(({ irrep, count }) => [irrep, count]));

test('every record has a kind that is checked below', () => {
  const kinds = ['directProduct', 'symmetrisedSquare', 'vibrations', 'selectionRule', 'correlation', 'termSplitting', 'dOrbitals'];
  expect(records).toHaveLength(file.count);
  expect(records.filter(({ kind }) => !kinds.includes(kind))).toEqual([]);
});

describe('direct products', () => {
  test.each(ofKind<{ irreps: string[]; expect: Sum }>('directProduct'))('$id', ({ group, irreps, expect: wanted, source }) => {
    expect(sum(directProduct(group, irreps)), source).toEqual(wanted);
  });
});

describe('squares', () => {
  type Square = { irrep: string; expect: { symmetric: Sum; antisymmetric: Sum } };
  test.each(ofKind<Square>('symmetrisedSquare'))('$id', ({ group, irrep, expect: wanted, source }) => {
    expect(sum(symmetricPower(group, irrep, 2)), source).toEqual(wanted.symmetric);
    expect(sum(antisymmetricPower(group, irrep, 2)), source).toEqual(wanted.antisymmetric);
  });
});

const oc = (text: string): Skeleton => ({ geometry: 'OC-6', sites: [...text] });
/** Site orders of OC-6: +z, −z, +x, −x, +y, −y. */
const skeletons: Record<string, Skeleton> = {
  'ML6 octahedral': oc('AAAAAA'),
  'ML4 tetrahedral': { geometry: 'T-4', sites: [...'AAAA'] },
  'ML4 square planar': { geometry: 'SP-4', sites: [...'AAAA'] },
  'ML5 trigonal bipyramidal': { geometry: 'TBPY-5', sites: [...'AAAAA'] },
  'ML5 square pyramidal': { geometry: 'SPY-5', sites: [...'AAAAA'] },
  'ML3 trigonal planar': { geometry: 'TP-3', sites: [...'AAA'] },
  'trans-ML4X2 octahedral': oc('XXAAAA'),
  'cis-ML4X2 octahedral': oc('XAXAAA'),
  'fac-ML3X3 octahedral': oc('XAXAXA'),
  'mer-ML3X3 octahedral': oc('XXXAAA'),
  'ML5X octahedral': oc('XAAAAA'),
  'M(AA)3 core MN6': { ...oc('AAAAAA'), links: [[0, 2], [1, 4], [3, 5]] },
};

describe('vibrations', () => {
  type Modes = { shape: string; expect: Record<string, Sum> };
  test.each(ofKind<Modes>('vibrations'))('$id $shape', ({ shape, group, expect: wanted, note, source }) => {
    const skeleton = skeletons[shape];
    if (!skeleton) throw new Error(`the test knows no skeleton for ${shape}`);
    const found = vibrations(skeleton);
    const which = (kept: (v: Vibration) => boolean): Sum => sum(found.vibrations.filter(kept));
    const ours: Record<string, Sum> = {
      vibrations: which(() => true),
      stretches: sum(found.stretches),
      infraredActive: which(({ infrared }) => infrared),
      ramanActive: which(({ raman }) => raman),
      ungerade: which(({ irrep }) => irrep.endsWith('u')),
    };
    expect(found.group).toBe(group);
    // Where a record says that its B labels hang on the axes, only the multiplicities of the B irreps are compared.
    const relabelled = note?.includes('compare as sets of multiplicities') ?? false;
    const compared = (of: Sum) =>
      relabelled ? Object.entries(of).map(([label, count]) => `${label.replace(/^B\d/, 'B')} ${count}`).sort() : of;
    expect(Object.keys(wanted).length).toBeGreaterThan(0);
    for (const [key, value] of Object.entries(wanted)) {
      expect(ours, source).toHaveProperty(key);
      expect(compared(ours[key]!), `${key}: ${source}`).toEqual(compared(value));
    }
  });
});

describe('selection rules', () => {
  type Rule = {
    title: string;
    ground: string;
    excited: string;
    shape?: string;
    spinMultiplicities: [number, number];
    expect: { orbitalProduct: Sum; spinAllowed: boolean; polarisations: Record<string, Polarisation> };
  };
  test.each(ofKind<Rule>('selectionRule'))('$id $title', (record) => {
    const { group, ground, excited, spinMultiplicities: spin, shape, expect: wanted, source } = record;
    const modes = shape ? vibrations(skeletons[shape]!).vibrations : undefined;
    const terms = { from: `${spin[0]}${ground}`, to: `${spin[1]}${excited}` };
    const found = selectionAnalysis({ group, ...terms, ...(modes && { vibrations: modes }) });
    expect(sum(found.product), source).toEqual(wanted.orbitalProduct);
    expect(found.spinAllowed).toBe(wanted.spinAllowed);
    for (const [names, polarisation] of Object.entries(wanted.polarisations)) {
      // Books disagree about these, as the record's own note tells.
      if (record.ungraded?.includes(names)) continue;
      for (const direction of names.split(',') as ('x' | 'y' | 'z')[]) {
        expect(found.dipole[direction], `${direction}: ${source}`).toBe(polarisation.dipoleAllowed);
        if (!polarisation.promotingModes) continue;
        expect([...found.vibronic[direction]].sort()).toEqual([...polarisation.promotingModes].sort());
        expect(found.vibronic[direction].length > 0).toBe(polarisation.vibronicallyAllowed);
      }
      const dipole = dipoleIrrep(group, names);
      expect(sum(directProduct(group, [ground, excited, dipole]))).toEqual(polarisation.product);
    }
    expect(found.steps.every((step) => step.length > 10)).toBe(true);
  });

  const dipoleIrrep = (group: string, names: string): string =>
    findGroup(group)!.irreps.find(({ functions }) => functions.includes(names[0]!))!.label;
});

describe('correlations', () => {
  type Correlation = { subgroup: string; expect: Record<string, Sum> };
  test.each(ofKind<Correlation>('correlation'))('$id $group to $subgroup', ({ group, subgroup, expect: wanted, source }) => {
    const { maps } = descend(group, subgroup);
    expect(Object.fromEntries(maps.map(({ irrep, terms }) => [irrep, sum(terms)])), source).toEqual(wanted);
  });
});

describe('term splittings', () => {
  test.each(ofKind<{ term: string; expect: Sum }>('termSplitting'))('$id', ({ group, term, expect: wanted, source }) => {
    const tally: Sum = {};
    for (const part of splitTerm(group, `1${term}`)) tally[part.slice(1)] = (tally[part.slice(1)] ?? 0) + 1;
    expect(tally, source).toEqual(wanted);
  });
});

describe('d orbitals', () => {
  test.each(ofKind<{ expect: Record<string, string> }>('dOrbitals'))('$id $group', ({ group, expect: wanted, source }) => {
    expect(Object.fromEntries(dOrbitals(group).map(({ orbital, irrep }) => [orbital, irrep])), source).toEqual(wanted);
  });
});
