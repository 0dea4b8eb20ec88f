import { type Direction, directions } from '#src/chem/symmetry/selection-rules.ts';
import type { ArgumentFacts, ArgumentLine } from './argument.ts';
import { listed, type Piece } from './pieces.ts';

/** Directions in a row: x, y and z. */
export const along = (members: readonly Direction[]): Piece[] => listed(members.map((direction) => ({ direction })));

/** What spin–orbit coupling does where the spin changes. */
export function spinOrbitLine({ analysis }: Pick<ArgumentFacts, 'analysis'>): ArgumentLine {
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

/** What a lower group would allow. Axes of group and subgroup differ, so that what opens newly is told by how many polarisations are open. */
export function lowerLine({ analysis }: Pick<ArgumentFacts, 'analysis'>): ArgumentLine {
  const { group, dipole } = analysis;
  const topic = 'Lower group';
  const open = (own: Record<Direction, boolean>): Direction[] => directions.filter((d) => own[d]);
  const before = open(dipole).length;
  const opening = analysis.lowerGroups.filter((entry) => open(entry.dipole).length > before);
  const [first] = opening;
  if (!first) {
    return {
      topic,
      verdict: null,
      pieces:
        before === 3
          ? ['every polarisation is open in ', { group }, ' already.']
          : ['no subgroup of ', { group }, ` is found to open a ${before > 0 ? 'further ' : ''}polarisation.`],
    };
  }
  const symbols = [...new Set(opening.map((entry) => entry.group))];
  const shown = symbols.slice(0, 4).map((symbol) => ({ group: symbol }));
  const more = symbols.length - shown.length;
  return {
    topic,
    verdict: 'lent',
    pieces: [
      'a fall from ',
      { group },
      ' to ',
      ...(more > 0 ? [...listed(shown, ', '), ` or ${more} other${more > 1 ? 's' : ''}`] : listed(shown, ' or ')),
      ` opens a ${before > 0 ? 'further ' : ''}polarisation: in `,
      { group: first.group },
      ', ',
      ...along(open(first.dipole)),
      ` ${open(first.dipole).length > 1 ? 'are' : 'is'} allowed (`,
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
