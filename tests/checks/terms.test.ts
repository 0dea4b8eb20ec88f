import { expect, test } from 'vitest';
import { diagram } from '#src/chem/ligand-field/diagram.ts';
import { freeIonTerms, hundGround } from '#src/chem/ligand-field/free-ion.ts';
import { freeIonRacah } from '#src/chem/ligand-field/racah-b.ts';
import file from './terms.json';

/* ligandFieldGround is checked in terms-ground.test.ts. */

type Rec = any;
const ofKind = (kind: string): Rec[] => {
  const found = (file.records as Rec[]).filter((record) => record.kind === kind);
  if (found.length === 0) throw new Error(`No record of the kind ${kind}`);
  return found;
};

const choose = (n: number, k: number): number => (k === 0 ? 1 : (choose(n - 1, k - 1) * n) / k);

test.each(ofKind('freeIonTerms'))('terms $id', ({ dCount, expect: wanted, source }) => {
  const terms = freeIonTerms(dCount, 1000, 4500);
  const counts: Record<string, number> = {};
  for (const { label } of terms) counts[label] = (counts[label] ?? 0) + 1;
  expect(counts, source).toEqual(wanted.terms);
  expect(terms).toHaveLength(wanted.numberOfTerms);
  const states = terms.reduce((sum, t) => sum + t.multiplicity * (2 * t.orbital + 1), 0);
  expect(states).toBe(wanted.microstates);
  expect(states).toBe(choose(10, dCount));
  const ground = hundGround(dCount);
  expect(ground.label).toBe(wanted.groundTerm);
  expect(terms[0]!.label).toBe(wanted.groundTerm);
  expect(ground.J).toBe(wanted.groundLevelJ);
  expect(ground.multiplicity * (2 * ground.orbital + 1)).toBe(wanted.groundTermDegeneracy);
});

test.each(ofKind('freeIonTermEnergies'))('energies $id', ({ dCount, relativeTo, expect: wanted, source }) => {
  // Not simple multiples of each other, so that no wrong pair of coefficients gives the same energy.
  const [B, C] = [913, 4001];
  const terms = freeIonTerms(dCount, B, C);
  // A counts the pairs of electrons and moves all terms alike; the program takes it as 0.
  const origin = relativeTo ? terms.find(({ label }) => label === relativeTo)!.energy : 0;
  for (const [label, coefficients] of Object.entries<Rec>(wanted)) {
    if (relativeTo) expect(coefficients.A).toBe(0);
    else expect(coefficients.A).toBe((dCount * (dCount - 1)) / 2);
    const energy = origin + coefficients.B * B + coefficients.C * C;
    const nearest = Math.min(...terms.filter((t) => t.label === label).map((t) => Math.abs(t.energy - energy)));
    expect(nearest, `${label}: ${source}`).toBeLessThan(1e-6);
  }
});

test.each(ofKind('spinCrossover'))('crossover $id', ({ dCount, geometry, C_over_B, expect: wanted, tolerance, source }) => {
  const { ground, crossings } = diagram({ n: dCount, geometry: geometry === 'Oh' ? 'OC-6' : 'T-4', ratioCB: C_over_B });
  expect(ground.map(({ label }) => label), source).toEqual([wanted.highSpinGround, wanted.lowSpinGround]);
  expect(crossings).toHaveLength(1);
  expect(Math.abs(crossings[0]!.x - wanted.Delta_over_B)).toBeLessThanOrEqual(tolerance.Delta_over_B);
});

test.each(ofKind('printedDiagramParameters'))('printed diagram $id', ({ expect: wanted, tolerance, source }) => {
  const [, element, charge] = /^([A-Z][a-z]?)(\d)\+$/.exec(wanted.ion)!;
  const found = freeIonRacah(element!, Number(charge));
  expect(Math.abs((found?.ratioCB ?? Number.NaN) - wanted.C_over_B), source).toBeLessThanOrEqual(tolerance.C_over_B);
  // The file gives no tolerance for B; the books round it to 5 cm-1.
  expect(Math.abs((found?.B ?? Number.NaN) - wanted.B_cm1)).toBeLessThanOrEqual(5);
});
