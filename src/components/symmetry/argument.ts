import type { IrrepCount, SelectionAnalysis } from '#src/chem/symmetry/index.ts';
import { type Direction, directions } from '#src/chem/symmetry/selection-rules.ts';
import { along, lowerLine, spinOrbitLine } from './argument-mixing.ts';
import { listed, type Piece, product } from './pieces.ts';

/** One numbered step of why a transition is strong or weak. */
export interface ArgumentLine {
  topic: string;
  /** What the step says of the intensity; null where it says nothing by itself. */
  verdict: 'allowed' | 'forbidden' | 'lent' | null;
  pieces: Piece[];
}

/** What the argument is made of. */
export interface ArgumentFacts {
  analysis: SelectionAnalysis;
  from: string;
  to: string;
  /** Vibrations of the skeleton in the group; null where no skeleton is known. */
  vibrations: readonly IrrepCount[] | null;
  /** Symmetric irrep of the group. */
  symmetric: string;
}

const MULTIPLICITIES = ['', 'singlet', 'doublet', 'triplet', 'quartet', 'quintet', 'sextet', 'septet'];

/** Multiplicity in a word: quartet. */
export const multiplicityWord = (multiplicity: number): string =>
  MULTIPLICITIES[multiplicity] ?? `${multiplicity}-fold`;

/** Multiplicity and irrep of a term: `4T1g(F)` is 4 and T1g. */
export function partsOf(term: string): { multiplicity: number; irrep: string } {
  const [, multiplicity = '1', irrep = term] = /^(\d+)(.+?)(?:\([^()]*\))?$/.exec(term) ?? [];
  return { multiplicity: Number(multiplicity), irrep };
}

/** The argument in steps; each names the group it is in. */
export function argumentLines(facts: ArgumentFacts): ArgumentLine[] {
  return [
    spinLine(facts),
    laporteLine(facts),
    productLine(facts),
    ...dipoleLines(facts),
    vibrationLine(facts),
    ...lendingLines(facts),
    spinOrbitLine(facts),
    lowerLine(facts),
  ];
}

function spinLine({ analysis, from, to }: ArgumentFacts): ArgumentLine {
  const [start, end] = [partsOf(from), partsOf(to)].map(({ multiplicity }) => multiplicityWord(multiplicity));
  return {
    topic: 'Spin',
    verdict: analysis.spinAllowed ? 'allowed' : 'forbidden',
    pieces: [`${start} to ${end}, ${analysis.spinAllowed ? 'allowed' : 'forbidden'}.`],
  };
}

/** g or u of an irrep of a group with a centre. */
export const parity = (irrep: string): string => (/u(?:[+-]|$)/.test(irrep) ? 'u' : 'g');

function laporteLine({ analysis, from, to }: ArgumentFacts): ArgumentLine {
  const group = { group: analysis.group };
  if (analysis.laporteAllowed === null) {
    return {
      topic: 'Laporte',
      verdict: null,
      pieces: [group, ' has no centre of inversion, so the rule has no meaning here.'],
    };
  }
  const [start, end] = [from, to].map((term) => parity(partsOf(term).irrep));
  return {
    topic: 'Laporte',
    verdict: analysis.laporteAllowed ? 'allowed' : 'forbidden',
    pieces: [
      `${start} to ${end} in `,
      group,
      `, which has a centre of inversion: ${analysis.laporteAllowed ? 'allowed' : 'forbidden'}.`,
    ],
  };
}

function productLine({ analysis, from, to }: ArgumentFacts): ArgumentLine {
  const irreps = [partsOf(from).irrep, partsOf(to).irrep];
  return {
    topic: 'Product',
    verdict: null,
    pieces: ['in ', { group: analysis.group }, ', Γ = ', ...product(irreps), ' = ', { sum: analysis.product }, '.'],
  };
}

/** Directions that share a value, in one entry each. */
function together<T>(value: (direction: Direction) => T, key: (value: T) => string) {
  const keys = [...new Set(directions.map((d) => key(value(d))))];
  return keys.map((own) => {
    const members = directions.filter((d) => key(value(d)) === own);
    return { members, value: value(members[0]!) };
  });
}

function dipoleLines({ analysis, from, to, symmetric }: ArgumentFacts): ArgumentLine[] {
  const { group, operators, dipole } = analysis;
  return together((d) => operators[d], String).map(({ members, value: irrep }) => {
    const open = dipole[members[0]!];
    return {
      topic: 'Dipole',
      verdict: open ? ('allowed' as const) : ('forbidden' as const),
      pieces: [
        'along ',
        ...along(members),
        ' it is ',
        { irrep },
        ' in ',
        { group },
        ': ',
        ...product([partsOf(from).irrep, irrep, partsOf(to).irrep]),
        open ? ' holds ' : ' holds no ',
        { irrep: symmetric },
        open ? ', allowed.' : ', forbidden.',
      ],
    };
  });
}

function vibrationLine({ analysis, vibrations }: ArgumentFacts): ArgumentLine {
  const group = { group: analysis.group };
  return {
    topic: 'Vibrations',
    verdict: null,
    pieces:
      vibrations === null
        ? ['no skeleton is known for ', group, ', so that vibrations are not judged.']
        : vibrations.length === 0
          ? ['the skeleton has none.']
          : ['of metal and donors in ', group, ': ', { sum: vibrations }, '.'],
  };
}

/** Only where the still skeleton closes a polarisation is anything lent. */
function lendingLines({ analysis, vibrations }: ArgumentFacts): ArgumentLine[] {
  if (vibrations === null) return [];
  const { dipole, vibronic } = analysis;
  const closed = directions.filter((d) => !dipole[d]);
  if (closed.length === 0) {
    return [
      { topic: 'Vibronic', verdict: null, pieces: ['no vibration is needed: every polarisation is open without.'] },
    ];
  }
  return together(
    (d) => (dipole[d] ? null : vibronic[d]),
    (lending) => lending?.join(' ') ?? 'open',
  )
    .filter(({ value }) => value !== null)
    .map(({ members, value }) => {
      const lending = value!.map((irrep) => ({ irrep }));
      return {
        topic: 'Vibronic',
        verdict: lending.length > 0 ? ('lent' as const) : ('forbidden' as const),
        pieces:
          lending.length > 0
            ? [
                ...listed(lending),
                ` ${lending.length === 1 ? 'lends' : 'lend'} intensity along `,
                ...along(members),
                '.',
              ]
            : ['none of these lends intensity along ', ...along(members), '.'],
      };
    });
}
