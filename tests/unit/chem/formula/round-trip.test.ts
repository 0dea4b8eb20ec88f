import fc from 'fast-check';
import { expect, test } from 'vitest';
import { DomainError } from '#src/chem/errors.ts';
import { readFormula } from '#src/chem/formula/index.ts';
import { ligands } from '#src/chem/ligands/index.ts';

const SEED = 20_260_131;
const metals = [
  'Ti',
  'V',
  'Cr',
  'Mn',
  'Fe',
  'Co',
  'Ni',
  'Cu',
  'Mo',
  'Ru',
  'Rh',
  'Os',
  'Ir',
  'Pt',
  'W',
  'Re',
  'Y',
  'Au',
];
const symbols = ligands.map((l) => l.abbreviation);
const parts = fc.uniqueArray(fc.tuple(fc.constantFrom(...symbols), fc.integer({ min: 1, max: 6 })), {
  minLength: 1,
  maxLength: 4,
  selector: ([symbol]) => symbol,
});
const write = (metal: string, ligandsOf: readonly (readonly [string, number])[]) =>
  `[${metal}${ligandsOf.map(([symbol, n]) => `(${symbol})${n === 1 ? '' : n}`).join('')}]`;
const charge = (z: number) => (z === 0 ? '' : `${Math.abs(z)}${z > 0 ? '+' : '-'}`);
const entities = fc.record({ metal: fc.constantFrom(...metals), parts, z: fc.integer({ min: -4, max: 4 }) });

test('the order of ligands does not change identity or print', () => {
  fc.assert(
    fc.property(entities, fc.array(fc.nat(), { minLength: 4, maxLength: 4 }), ({ metal, parts: written, z }, keys) => {
      const shuffled = written
        .map((part, i) => ({ part, key: keys[i] ?? 0 }))
        .sort((a, b) => a.key - b.key)
        .map(({ part }) => part);
      const first = readFormula(write(metal, written) + charge(z));
      const second = readFormula(write(metal, shuffled) + charge(z));
      expect(second.entities[0]?.identity).toBe(first.entities[0]?.identity);
      expect(second.formula).toBe(first.formula);
    }),
    { seed: SEED, numRuns: 400 },
  );
});

test('what is printed reads back as itself', () => {
  fc.assert(
    fc.property(entities, ({ metal, parts: written, z }) => {
      const reading = readFormula(write(metal, written) + charge(z));
      const again = readFormula(reading.formula);
      expect(again.formula).toBe(reading.formula);
      expect(again.composition).toEqual(reading.composition);
      expect(again.entities[0]?.identity).toBe(reading.entities[0]?.identity);
    }),
    { seed: SEED, numRuns: 800 },
  );
});

test('salts read back, and their entity is that of the bare ion', () => {
  const anions = ['Cl', 'Br', '(PF6)', '(ClO4)', '(NO3)', '(BPh4)', '(OTf)'];
  const solvates = ['', '·H2O', '·3H2O', '·0.5CH2Cl2', '·MeCN'];
  fc.assert(
    fc.property(
      fc.constantFrom('Co', 'Cr', 'Ru', 'Rh'),
      fc.constantFrom(...anions),
      fc.constantFrom(...solvates),
      fc.integer({ min: 2, max: 3 }),
      (metal, anion, solvate, n) => {
        const salt = readFormula(`[${metal}(phen)3]${anion}${n}${solvate}`);
        expect(salt.entityCharge).toBe(n);
        expect(salt.entities[0]?.identity).toBe(readFormula(`[${metal}(phen)3]${n}+`).entities[0]?.identity);
        const again = readFormula(salt.formula);
        expect(again.formula).toBe(salt.formula);
        expect(again.hill).toBe(salt.hill);
      },
    ),
    { seed: SEED, numRuns: 150 },
  );
});

test('any text is read or refused by a DomainError, in good time', () => {
  const alphabet = fc.constantFrom(
    ...'[](){}·.*0123456789+-^μηΔ/ ',
    'Co',
    'Fe',
    'CN',
    'NH3',
    'H2O',
    'en',
    'Cl',
    'K',
    'SO4',
    'x',
    'trans-',
  );
  const started = performance.now();
  fc.assert(
    fc.property(fc.array(alphabet, { maxLength: 60 }), (tokens) => {
      try {
        readFormula(tokens.join(''));
      } catch (error) {
        expect(error).toBeInstanceOf(DomainError);
      }
    }),
    { seed: SEED, numRuns: 3000 },
  );
  expect(performance.now() - started).toBeLessThan(15_000);
});

test('the longest text allowed takes milliseconds', () => {
  const text = `[Co${'(NH3)'.repeat(98)}]3+`;
  const started = performance.now();
  readFormula(text);
  expect(performance.now() - started).toBeLessThan(500);
});
