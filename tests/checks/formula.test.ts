import { describe, expect, test } from 'vitest';
import { DomainError } from '#src/chem/errors.ts';
import { type Reading, readFormula } from '#src/chem/formula/index.ts';
import { findLigand } from '#src/chem/ligands/index.ts';
import file from './formula.json';

interface Expectation {
  hill: string;
  composition: Record<string, number>;
  overallCharge: number;
  entityCharge: number;
  metals: { element: string; oxidationState: number; dElectrons: number }[];
  ligands: { ligand: string; charge: number; count: number }[];
  counterIons: { ion: string; charge: number; count: number }[];
  hydrateWater: number;
  molarMass: number;
  coordinationNumber?: number;
}

interface Good {
  id: string;
  input: string;
  expect: Expectation;
  tolerance: { molarMass: number };
  source: string;
  sameAs?: string[];
}

interface Bad {
  id: string;
  input: string;
  expect: { outcome: 'refuse' | 'question'; reason: string };
  why: string;
}

const records = file.records as unknown as (Good | Bad)[];
const good = records.filter((r): r is Good => 'hill' in r.expect);
const bad = records.filter((r): r is Bad => 'outcome' in r.expect);

/** Spellings that the record calls one substance but that are other entities, and why; their composition must agree. */
const DIFFERENT_ENTITY: Readonly<Record<string, string>> = {
  '[Cu(NH3)4]SO4·H2O': 'lattice water in place of bound water, as the note of f-009 says',
  '[Co(NH3)5(ONO)]2+': 'linkage isomer, as the note of f-030 says',
  '(NH4)2[Fe(H2O)6](SO4)2': 'the unbracketed spelling asks whether the water is bound; answered "aqua" they agree (below)',
};

const identities = (reading: Reading) => reading.entities.map((e) => e.identity).sort();
const sorted = (lines: string[]) => [...lines].sort();

test('the file holds both kinds of record', () => {
  expect(good.length + bad.length).toBe(file.count);
  expect(good.length).toBeGreaterThan(20);
  expect(bad.length).toBeGreaterThan(10);
});

describe.each(good)('$id $input', ({ input, expect: wanted, tolerance, source, sameAs = [] }) => {
  const reading = readFormula(input);

  test('composition, mass and charges', () => {
    expect(reading.composition, source).toEqual(wanted.composition);
    expect(reading.hill).toBe(wanted.hill);
    expect(Math.abs(reading.molarMass - wanted.molarMass)).toBeLessThanOrEqual(tolerance.molarMass);
    expect(reading.overallCharge).toBe(wanted.overallCharge);
    // For a salt of two complexes the record gives the charge of the pair.
    expect(reading.entities.reduce((sum, e) => sum + e.count * (e.charge ?? Number.NaN), 0)).toBe(wanted.entityCharge);
  });

  test('centres, ligands, counter-ions, water', () => {
    expect(reading.centres.map(({ element, oxidationState, dCount }) => ({ element, oxidationState, dCount })), source).toEqual(
      wanted.metals.map(({ element, oxidationState, dElectrons }) => ({ element, oxidationState, dCount: dElectrons })),
    );
    const line = (abbreviation: string | undefined, count: number, charge: number | null) => `${count} ${abbreviation} ${charge}`;
    expect(sorted(reading.ligands.map((l) => line(l.abbreviation, l.count, l.charge)))).toEqual(
      sorted(wanted.ligands.map((l) => line(findLigand(l.ligand)?.abbreviation, l.count, l.charge))),
    );
    expect(sorted(reading.counterIons.map((i) => `${i.count} ${i.formula.replace('^', ' ')} ${i.charge}`))).toEqual(
      sorted(wanted.counterIons.map((i) => `${i.count} ${i.ion} ${i.charge}`)),
    );
    expect(reading.solvates.find((s) => s.formula === 'H2O')?.count ?? 0).toBe(wanted.hydrateWater);
    if (wanted.coordinationNumber !== undefined) expect(reading.coordinationNumber).toBe(wanted.coordinationNumber);
  });

  test('the printed formula reads back as the same', () => {
    const again = readFormula(reading.formula);
    expect(again.formula).toBe(reading.formula);
    expect(identities(again)).toEqual(identities(reading));
  });

  test.each(sameAs)('same as %s', (spelling) => {
    const other = readFormula(spelling);
    expect(other.composition).toEqual(reading.composition);
    if (spelling in DIFFERENT_ENTITY) expect(identities(other), DIFFERENT_ENTITY[spelling]).not.toEqual(identities(reading));
    else expect(identities(other)).toEqual(identities(reading));
  });
});

describe.each(bad)('$id $input: $why', ({ input, expect: wanted }) => {
  test(`${wanted.outcome}: ${wanted.reason}`, () => {
    if (wanted.outcome === 'refuse') {
      const refusal = refusalOf(input);
      expect(refusal.code).toBe(wanted.reason);
      expect(refusal.field).toBe('formula');
      expect(refusal.position).toBeTypeOf('number');
    } else {
      const reading = readFormula(input);
      const question = reading.questions.find((q) => q.code === wanted.reason);
      expect(question?.choices.length).toBeGreaterThan(0);
      expect(reading.centres.every((c) => c.oxidationState === null && c.dCount === null)).toBe(true);
    }
  });
});

function refusalOf(text: string): DomainError {
  try {
    readFormula(text);
  } catch (error) {
    if (error instanceof DomainError) return error;
    throw error;
  }
  throw new Error(`${text} was read`);
}

test('the spellings of f-018 meet once the water is said to be bound', () => {
  const asked = readFormula('(NH4)2Fe(SO4)2·6H2O', { 'aqua-ion': 'aqua' });
  const written = readFormula('(NH4)2[Fe(H2O)6](SO4)2');
  expect(identities(asked)).toEqual(identities(written));
  expect(asked.formula).toBe(written.formula);
});
