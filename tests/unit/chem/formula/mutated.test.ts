import fc from 'fast-check';
import { expect, test } from 'vitest';
import { DomainError } from '#src/chem/errors.ts';
import { readFormula } from '#src/chem/formula/index.ts';
import file from '../../../checks/formula.json';

const SEED = 20_260_131;
const RUNS = process.env.ZAFFRE_LONG === '1' ? 100_000 : 3_000;

const sound = [
  ...file.records.map((record) => record.input).filter((input) => input !== ''),
  '[Ru(NH3)5(pz)]2+',
  '[Ni(dmg)2]',
  '[Ir(ppy)2Cl]2',
  '[Cu(NO3-κO)2(py)2]',
  'trans(N)-[Co(gly)3]·1½D2O',
  '(OC-6-22)-[Co(ND3)3Cl3]',
  '[(NH3)5Co(μ-O2)Co(NH3)5](NO3)5',
  '[{Fe(CO)3}3(μ3-S)2]',
  'Fe4[57Fe(CN)6]3·14 H2O',
  "Zeise's salt",
];
const pieces = fc.constantFrom(
  ...'[](){}·.*0123456789+-−^_$μηκΔ/½⁺²₃ ,;′<>xD',
  'Co',
  'Fe',
  'La',
  'CN',
  'NH3',
  'H2O',
  'D2O',
  'en',
  'dmg',
  'pz',
  'Cl',
  'K',
  'SO4',
  'NO3',
  'trans-',
  'μ-',
  'η5-',
  '-κO',
  '[2H]',
  'd6-',
  '<sub>',
);

/** A sound formula with a few characters struck out, doubled, exchanged or put in. */
const mutated = fc
  .tuple(
    fc.constantFrom(...sound),
    fc.array(fc.tuple(fc.nat(), fc.constantFrom('out', 'in', 'twice', 'swap', 'cut', 'join'), pieces, fc.nat()), {
      minLength: 1,
      maxLength: 5,
    }),
  )
  .map(([text, changes]) =>
    changes.reduce((now, [where, how, piece, other]) => {
      const at = now.length === 0 ? 0 : where % now.length;
      if (how === 'out') return now.slice(0, at) + now.slice(at + 1);
      if (how === 'in') return now.slice(0, at) + piece + now.slice(at);
      if (how === 'twice') return now.slice(0, at) + now.slice(at, at + 6) + now.slice(at);
      if (how === 'swap') return now.slice(0, at) + (now[at + 1] ?? '') + (now[at] ?? '') + now.slice(at + 2);
      if (how === 'join') return now + sound[other % sound.length];
      return now.slice(0, at);
    }, text),
  );

const noise = fc.array(pieces, { maxLength: 60 }).map((tokens) => tokens.join(''));

/** Reads, or refuses at a place within the text; answered by its own first choices it never falls over either. */
function mustReadOrRefuse(text: string): void {
  try {
    const reading = readFormula(text);
    const codes = reading.questions.map((q) => q.code);
    expect(new Set(codes).size, 'codes are unique').toBe(codes.length);
    for (const q of reading.questions) {
      expect(q.choices.length, q.code).toBeGreaterThan(0);
      if (q.position !== undefined) expect(q.position).toBeLessThanOrEqual(text.length);
    }
    if (codes.length > 0)
      readFormula(text, Object.fromEntries(reading.questions.map((q) => [q.code, q.choices[0]!.value])));
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    expect(error.field).toBe('formula');
    expect(error.position).toBeGreaterThanOrEqual(0);
    expect(error.position).toBeLessThanOrEqual(Math.max(text.length, 500));
  }
}

test(
  `${RUNS} mutated formulae and strings of noise are read or refused`,
  () => {
    fc.assert(
      fc.property(fc.oneof({ arbitrary: mutated, weight: 3 }, { arbitrary: noise, weight: 1 }), mustReadOrRefuse),
      {
        seed: SEED,
        numRuns: RUNS,
      },
    );
  },
  15 * 60_000,
);

test('any Unicode is read or refused', () => {
  fc.assert(fc.property(fc.string({ unit: 'binary', maxLength: 80 }), mustReadOrRefuse), {
    seed: SEED,
    numRuns: Math.min(RUNS, 20_000),
  });
}, 120_000);
