import type { IrrepCount, SelectionAnalysis } from '#src/chem/symmetry/index.ts';
import { type Direction, directions } from '#src/chem/symmetry/selection-rules.ts';
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

const along = (members: readonly Direction[]): Piece[] => listed(members.map((direction) => ({ direction })));

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
    return [{ topic: 'Lent', verdict: null, pieces: ['no vibration is needed: every polarisation is open without.'] }];
  }
  return together(
    (d) => (dipole[d] ? null : vibronic[d]),
    (lending) => lending?.join(' ') ?? 'open',
  )
    .filter(({ value }) => value !== null)
    .map(({ members, value }) => {
      const lending = value!.map((irrep) => ({ irrep }));
      return {
        topic: 'Lent',
        verdict: lending.length > 0 ? ('lent' as const) : ('forbidden' as const),
        pieces:
          lending.length > 0
            ? [
                ...listed(lending),
                ` ${lending.length === 1 ? 'lends' : 'lend'} intensity along `,
                ...along(members),
                ': vibronic.',
              ]
            : ['none of these lends intensity along ', ...along(members), '.'],
      };
    });
}

function spinOrbitLine({ analysis }: ArgumentFacts): ArgumentLine {
  const { allowed, dipole, vibronic, order, components } = analysis.spinOrbit;
  const topic = 'Spin–orbit';
  if (allowed === null) return { topic, verdict: null, pieces: ['not needed, as the spin does not change.'] };
  if (order === null) return { topic, verdict: 'forbidden', pieces: ['no coupling joins the two multiplicities.'] };
  const open = directions.filter((d) => dipole?.[d]);
  const helpers = [...new Set(directions.flatMap((d) => vibronic?.[d] ?? []))].map((irrep) => ({ irrep }));
  const become: Piece[] = components
    ? [
        'in the double group of ',
        { group: analysis.group },
        ' the terms become ',
        ...betheSum(components.from),
        ' and ',
        ...betheSum(components.to),
        '; ',
      ]
    : ['in ', { group: analysis.group }, ' '];
  const outcome: Piece[] =
    open.length > 0
      ? ['the dipole along ', ...along(open), ' joins some of them.']
      : helpers.length > 0
        ? ['the dipole joins them with a quantum of ', ...listed(helpers, ' or '), '.']
        : ['the dipole joins none of them.'];
  const times = order > 1 ? [` It must act ${order} times, so that what it lends is small.`] : [];
  return {
    topic,
    verdict: open.length > 0 || helpers.length > 0 ? 'lent' : 'forbidden',
    pieces: [...become, ...outcome, ...times],
  };
}

/** `Γ7+ + 2Γ8+`, `(Γ5,Γ6)`: the text of the core as a sum. */
const betheSum = (text: string): Piece[] => [
  {
    sum: text.split(' + ').map((part) => {
      const [, count = '', irrep = part] = /^(\d*)\(?(.*?)\)?$/.exec(part) ?? [];
      return { irrep, count: count === '' ? 1 : Number(count) };
    }),
  },
];

function lowerLine({ analysis }: ArgumentFacts): ArgumentLine {
  const { lowerGroups, group, dipole } = analysis;
  const topic = 'Lower group';
  const [first] = lowerGroups;
  if (!first) {
    const all = directions.every((d) => dipole[d]);
    return {
      topic,
      verdict: null,
      pieces: all
        ? ['every polarisation is open in ', { group }, ' already.']
        : ['no subgroup of ', { group }, ' is judged to open a polarisation.'],
    };
  }
  const symbols = [...new Set(lowerGroups.map((entry) => entry.group))];
  const shown = symbols.slice(0, 4).map((symbol) => ({ group: symbol }));
  const more = symbols.length - shown.length;
  const opened = directions.filter((d) => first.dipole[d]);
  return {
    topic,
    verdict: 'lent',
    pieces: [
      'a fall from ',
      { group },
      ' to ',
      ...(more > 0 ? [...listed(shown, ', '), ` or ${more} other${more > 1 ? 's' : ''}`] : listed(shown, ' or ')),
      ' opens a polarisation: in ',
      { group: first.group },
      ' along ',
      ...along(opened),
      ' (',
      ...listed(
        first.from.map((term) => ({ term })),
        ', ',
      ),
      ' to ',
      ...listed(
        first.to.map((term) => ({ term })),
        ', ',
      ),
      ').',
    ],
  };
}
