import type { BandClass } from '#src/chem/assignment/band-classes.ts';

export type { BandClass };

/** How a stroke of a class is drawn: dashed, as two thin lines, or as an outline with nothing in it. */
export type Stroke = { kind: 'dashed'; dash: string } | { kind: 'double' } | { kind: 'hollow' };

/** A class told by letter, pigment and stroke together, so that none of the three has to be seen. */
export interface BandStyle {
  letter: string;
  name: string;
  /** The pigment of the current theme. */
  colour: string;
  stroke: Stroke;
}

const dashed = (dash: string): Stroke => ({ kind: 'dashed', dash });
const OTHER = { letter: 'o', colour: 'var(--color-band-other)', stroke: dashed('6 2 2 2') };

/** The one table of letters, pigments and strokes. */
export const BAND_STYLES: Record<BandClass, BandStyle> = {
  'd-d': { letter: 'd', name: 'd–d', colour: 'var(--color-band-dd)', stroke: dashed('') },
  LMCT: { letter: 'L', name: 'LMCT', colour: 'var(--color-band-lmct)', stroke: dashed('5 2') },
  MLCT: { letter: 'M', name: 'MLCT', colour: 'var(--color-band-mlct)', stroke: dashed('5 2 1 2') },
  intraligand: { letter: 'i', name: 'intraligand', colour: 'var(--color-band-intraligand)', stroke: dashed('1.5 2') },
  interligand: { letter: 'x', name: 'interligand', colour: 'var(--color-band-interligand)', stroke: dashed('3 2') },
  intervalence: {
    letter: 'v',
    name: 'intervalence',
    colour: 'var(--color-band-intervalence)',
    stroke: { kind: 'double' },
  },
  'metal-metal': { ...OTHER, name: 'metal–metal' },
  'metal-centred-other': { ...OTHER, name: 'metal-centred, other' },
  'ion-pair': { ...OTHER, name: 'ion pair' },
  other: { ...OTHER, name: 'other' },
  unassigned: { letter: '–', name: 'unassigned', colour: 'var(--color-band-none)', stroke: { kind: 'hollow' } },
};

/** The style of a class; one that is not in the table is shown as unassigned. */
export function bandStyle(bandClass: string | null | undefined): BandStyle {
  return BAND_STYLES[(bandClass ?? 'unassigned') as BandClass] ?? BAND_STYLES.unassigned;
}
