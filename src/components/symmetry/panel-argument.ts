import { findGroup, selectionAnalysis, type TransitionTable } from '#src/chem/symmetry/index.ts';
import { type ArgumentLine, argumentLines, parity, partsOf } from './argument.ts';
import { bare, matchesOf, type PlacedBand, type Row, type View } from './band-matching.ts';
import { epsilonLine, usualOf } from './epsilon-line.ts';
import { type SkeletonFacts, viewVibrations } from './view-vibrations.ts';

/** The transitions of one centre, as the service tells them. */
export type CentreTransitions = TransitionTable & { element: string; dCount: number | null; geometry: string | null };

/** One transition between terms of the group of a view. */
export interface Part {
  from: string;
  to: string;
}

/** The row that a choice means: of its own, or the first that a band's label can mean. */
export function chosenRow(table: TransitionTable, view: View, band: PlacedBand | null, row: string | null): Row | null {
  const label = band ? matchesOf(table, band.band.assignment)[0]?.row : row;
  return view.rows.find((each) => each.label === label) ?? null;
}

/** Parts that a band's term has in a view; where its label was read in that group, the part so labelled first. */
export function partsOfRow(table: TransitionTable, view: View, row: Row, band: PlacedBand | null): Part[] {
  const own = band ? matchesOf(table, band.band.assignment)[0] : undefined;
  const named = own?.to && own.group === view.group ? own.to : null;
  const rank = ({ to, mechanism }: Row['transitions'][number]) =>
    (to === named ? 0 : 10) + ['allowed', 'vibronic', 'spin-forbidden', 'spin-forbidden-vibronic'].indexOf(mechanism);
  return [...row.transitions].sort((a, b) => rank(a) - rank(b)).map(({ from, to }) => ({ from, to }));
}

/** Terms of a band that stands in no row, where both are terms of the group. */
export function ownTerms(group: string, { band }: PlacedBand): Part | null {
  const { from, to } = band.assignment;
  if (!from || !to) return null;
  const part = { from: bare(from), to: bare(to) };
  try {
    selectionAnalysis({ group, ...part });
    return part;
  } catch {
    return null; // orbitals, or terms of another group: nothing to judge
  }
}

/** The whole argument for a part, the strength of the band at its end. */
export function panelArgument(
  view: Pick<View, 'kind' | 'group'>,
  part: Part,
  band: PlacedBand | null,
  centre: SkeletonFacts & { element: string },
): ArgumentLine[] {
  const group = findGroup(view.group)!;
  const vibrations = viewVibrations(view, centre);
  const analysis = selectionAnalysis({
    group: view.group,
    ...part,
    ...(vibrations ? { vibrations } : {}),
  });
  const usual = usualOf({
    bandClass: band?.band.assignment.class ?? 'd-d',
    spinAllowed: analysis.spinAllowed,
    element: centre.element,
    geometry: centre.geometry,
    centrosymmetric: group.centrosymmetric,
  });
  return [
    ...argumentLines({ analysis, ...part, vibrations, symmetric: group.irreps[0]!.label }),
    epsilonLine(band ? band.band.epsilon : undefined, usual),
  ];
}

/** Allowed by both rules; where the Laporte rule has no meaning, d–d bands still stay far below charge transfer. */
export function isStrong(group: string, { from, to }: Part, band: PlacedBand | null): boolean {
  const [start, end] = [partsOf(from), partsOf(to)];
  if (start.multiplicity !== end.multiplicity) return false;
  if (findGroup(group)!.centrosymmetric) return parity(start.irrep) !== parity(end.irrep);
  return band !== null && band.band.assignment.class !== 'd-d';
}

/** What can be said of a band whose terms are not told or not of a group: its class and its strength. */
export function classArgument(
  band: PlacedBand,
  { element, geometry, centrosymmetric }: { element: string; geometry: string | null; centrosymmetric: boolean },
): ArgumentLine[] {
  const { class: bandClass } = band.band.assignment;
  const usual = usualOf({ bandClass, spinAllowed: true, element, geometry, centrosymmetric });
  const charge = ['LMCT', 'MLCT'].includes(bandClass);
  return [
    {
      topic: 'Terms',
      verdict: null,
      pieces: [
        charge
          ? 'the assignment names no terms of a group, so symmetry does not judge it. Charge transfer is usually, not always, spin and Laporte allowed.'
          : 'the assignment names no terms of a group, so symmetry does not judge it.',
      ],
    },
    epsilonLine(band.band.epsilon, usual),
  ];
}
