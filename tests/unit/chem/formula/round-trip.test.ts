import fc from 'fast-check';
import { expect, test } from 'vitest';
import { readFormula } from '#src/chem/formula/index.ts';
import { complexes, plainly, somehow, whims } from './spellings.ts';

const SEED = 20_260_131;
const RUNS = process.env.ZAFFRE_LONG === '1' ? 20_000 : 2_000;

const identity = (text: string) => readFormula(text).entities[0]?.identity;

test('however one complex is written, it has one key and one printed form', () => {
  fc.assert(
    fc.property(complexes, whims, whims, (complex, one, other) => {
      const [first, second] = [readFormula(somehow(complex, one)), readFormula(somehow(complex, other))];
      expect(first.entities[0]?.identity).toBe(identity(plainly(complex)));
      expect(second.entities[0]?.identity).toBe(first.entities[0]?.identity);
      expect(second.formula).toBe(first.formula);
      expect(second.questions.map((q) => q.code)).toEqual(first.questions.map((q) => q.code));
    }),
    { seed: SEED, numRuns: RUNS },
  );
}, 300_000);

test('different complexes have different keys', () => {
  fc.assert(
    fc.property(complexes, complexes, fc.nat({ max: 4 }), (a, b, how) => {
      // Half of the time a near relation: another charge, count, ligand or metal
      const [symbol, n] = a.parts[0]!;
      const near = [
        b,
        { ...a, charge: a.charge + 1 },
        { ...a, parts: [[symbol, n + 1] as const, ...a.parts.slice(1)] },
        { ...a, parts: [...a.parts.slice(1), ...b.parts.filter(([s]) => !a.parts.some(([own]) => own === s))] },
        { ...a, metal: b.metal },
      ][how]!;
      const told = ({ metal, parts, charge }: typeof a) =>
        [metal, charge, ...parts.map(([s, count]) => `${s}*${count}`).sort()].join();
      fc.pre(near.parts.length > 0 && told(near) !== told(a));
      expect(identity(plainly(near))).not.toBe(identity(plainly(a)));
    }),
    { seed: SEED, numRuns: RUNS },
  );
}, 300_000);

test('what is printed reads back as itself', () => {
  fc.assert(
    fc.property(complexes, (complex) => {
      const reading = readFormula(plainly(complex));
      const again = readFormula(reading.formula);
      expect(again.formula).toBe(reading.formula);
      expect(again.composition).toEqual(reading.composition);
      expect(again.entities[0]?.identity).toBe(reading.entities[0]?.identity);
    }),
    { seed: SEED, numRuns: RUNS },
  );
}, 300_000);

test('so do polynuclear ones, with fragments, bridges and bonds', () => {
  const metal = fc.constantFrom('Fe', 'Co', 'Ru', 'Rh', 'Mo', 'Cu', 'Pt');
  const terminal = fc.constantFrom('NH3', 'CO', 'Cl', 'PPh3', 'cod', 'Cp', 'H2O', 'ppy');
  const bridge = fc.constantFrom('Cl', 'OH', 'OAc', 'CO', 'pyz', 'S', 'N3', 'CN', '4,4′-bpy', 'SPh');
  const fragment = fc.tuple(metal, terminal, fc.integer({ min: 1, max: 5 }));
  const written = fc
    .tuple(
      fragment,
      fragment,
      bridge,
      fc.integer({ min: 1, max: 3 }),
      fc.nat({ max: 3 }),
      fc.integer({ min: -3, max: 5 }),
    )
    .map(([[m1, l1, n1], [m2, l2, n2], b, k, how, z]) => {
      const charge = z === 0 ? '' : `${Math.abs(z)}${z > 0 ? '+' : '-'}`;
      return [
        `[(${l1})${n1}${m1}(μ-${b})${k}${m2}(${l2})${n2}]${charge}`,
        `[{${m1}(${l1})${n1}}2(μ-${b})${k}]${charge}`,
        `[{${m1}(${l1})${n1}}{${m2}(${l2})${n2}}(μ-${b})${k}]${charge}`,
        `[${m1}2(${l1})${2 * n1}(μ-${b})${k}]${charge}`,
      ][how]!;
    });
  fc.assert(
    fc.property(written, (text) => {
      const reading = readFormula(text);
      const again = readFormula(reading.formula);
      expect(again.formula).toBe(reading.formula);
      expect(again.composition).toEqual(reading.composition);
      expect(again.entities.map((e) => e.identity)).toEqual(reading.entities.map((e) => e.identity));
    }),
    { seed: SEED, numRuns: RUNS },
  );
}, 300_000);

test('salts read back, and their entity is that of the bare ion', () => {
  const anions = ['Cl', 'Br', '(PF6)', '(ClO4)', '(NO3)', '(BPh4)', '(OTf)'];
  const solvates = ['', '·H2O', '·3H2O', '·0.5CH2Cl2', '·MeCN', '·½H2O', ' 2 H2O', '·D2O·0.25MeOH'];
  const prefixes = ['', 'Δ-', 'rac-', '(+)589-', '(OC-6-11)-'];
  fc.assert(
    fc.property(
      fc.constantFrom('Co', 'Cr', 'Ru', 'Rh'),
      fc.constantFrom(...anions),
      fc.constantFrom(...solvates),
      fc.constantFrom(...prefixes),
      fc.integer({ min: 2, max: 3 }),
      (metal, anion, solvate, prefix, n) => {
        const salt = readFormula(`${prefix}[${metal}(phen)3]${anion}${n}${solvate}`);
        expect(salt.entityCharge).toBe(n);
        expect(salt.entities[0]?.identity).toBe(identity(`[${metal}(phen)3]${n}+`));
        const again = readFormula(salt.formula);
        expect(again.formula).toBe(salt.formula);
        expect(again.hill).toBe(salt.hill);
        expect(again.configuration).toBe(salt.configuration);
      },
    ),
    { seed: SEED, numRuns: 400 },
  );
}, 60_000);

test('answering by the first choices ends in a reading without questions', () => {
  fc.assert(
    fc.property(complexes, (complex) => {
      const answers: Record<string, string> = {};
      let reading = readFormula(plainly(complex), answers);
      for (let round = 0; round < 8 && reading.questions.length > 0; round += 1) {
        for (const q of reading.questions) answers[q.code] = q.choices[0]!.value;
        reading = readFormula(plainly(complex), answers);
      }
      expect(reading.questions).toEqual([]);
    }),
    { seed: SEED, numRuns: RUNS },
  );
}, 300_000);
