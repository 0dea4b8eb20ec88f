import { IsotopicDistribution } from 'isotopic-distribution';
import { MF } from 'mf-parser';
import { isotopePattern } from '#src/chem/composition/index.ts';
import { DomainError } from '#src/chem/errors.ts';
import { MAX_LENGTH } from '#src/chem/formula/normalise.ts';
import { readFormula } from '#src/chem/formula/read.ts';
import type { BenchRow } from '../bench.ts';

const ROUNDS = 200;
/** What a keystroke may cost before a person feels it. */
const LIMIT_MS = 50;

const everyday = [
  'K4[Fe(CN)6]·3H2O',
  '[Ru(bpy)3](PF6)2',
  'trans-[CoCl2(en)2]Cl',
  '[{Ru(NH3)5}2(μ-pyz)]5+',
  '(NH4)2Fe(SO4)2·6H2O',
  '[Co(D2O)6]2+',
];

/** Texts of full length that make a reader work: repeats of what has to be looked up, nested, nearly known, unknown. */
function longest(): string[] {
  const units = [
    '(NH3)',
    '(byp)',
    'NO3',
    'D2O',
    'COD',
    'μ-',
    '(μ-OH)',
    '(C9H8N2)',
    '{Co(NH3)5}',
    '[Fe(CN)6]',
    'Fe4[Fe(CN)6]3',
    'trans,cis-',
    '·½H2O',
    ' 3 H2O',
    '(((((((CN)))))))',
    '(O2)(NO)(cat)',
    '(NO3)(SO4)(OAc)',
    'qwertyuiop',
    '9',
    '+',
    '^2',
    'Zz',
    'η5-Cp',
    '(dmg)(pz)(im)',
    '[2H]',
    '(+)-',
  ];
  return units.flatMap((unit) =>
    ['', '[Co', 'K', 'Co(', '[Co(NH3)5'].map((head) => {
      const tail = { '[Co': ']3+', 'Co(': ')2', '[Co(NH3)5': ']2+' }[head] ?? '';
      const room = MAX_LENGTH - head.length - tail.length;
      return head + unit.repeat(Math.floor(room / unit.length)) + tail;
    }),
  );
}

function timeToRead(text: string): number {
  const started = performance.now();
  try {
    readFormula(text);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
  }
  return performance.now() - started;
}

const median = (times: number[]) => times.sort((a, b) => a - b)[Math.floor(times.length / 2)]!;

function timed(work: () => unknown): number {
  const started = performance.now();
  work();
  return performance.now() - started;
}

/** Median time of two works in turns, so that a slow moment of the machine falls on both. */
function beside(rounds: number, ours: () => unknown, baseline: () => unknown) {
  const times = Array.from({ length: rounds }, () => [timed(ours), timed(baseline)] as const);
  const [a, b] = [median(times.map(([x]) => x)), median(times.map(([, y]) => y))];
  return { ours: a, baseline: b, ratio: b / a };
}

const slowest: BenchRow = {
  name: `slowest of ${longest().length} formulae of ${MAX_LENGTH} characters, beside ${LIMIT_MS} ms`,
  run() {
    const texts = longest();
    for (const text of texts) timeToRead(text); // once to warm up
    const ours = Math.max(...texts.map((text) => median([timeToRead(text), timeToRead(text), timeToRead(text)])));
    return { ours, baseline: LIMIT_MS, ratio: LIMIT_MS / ours };
  },
};

const keystroke: BenchRow = {
  name: `${everyday.length} everyday formulae read whole, beside mf-parser on their Hill formulae alone`,
  run() {
    const hill = everyday.map((text) => readFormula(text).hill);
    return beside(
      ROUNDS,
      () => everyday.map((text) => readFormula(text)),
      () => hill.map((text) => new MF(text).getInfo().mass),
    );
  },
};

const pattern: BenchRow = {
  name: 'isotope pattern of [PW12O40]3-, beside isotopic-distribution',
  run: () =>
    beside(
      9,
      () => isotopePattern({ P: 1, W: 12, O: 40 }, { charge: -3 }),
      () => new IsotopicDistribution('PW12O40(-3)', { fwhm: 0.01 }).getXY(),
    ),
};

export default [slowest, keystroke, pattern];
