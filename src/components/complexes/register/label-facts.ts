import type { ComplexSummary } from '#src/contracts/complexes.ts';
import type { Settled } from './settle.ts';

/**
 * Whether a point group, in plain text, holds the inversion.
 *
 * @see the Schoenflies groups: Ci, Cnh and Dnh with n even, Dnd and S2n with n odd, Th, Oh, Ih, D∞h (common practice)
 */
export function hasInversion(group: string): boolean {
  if (['Ci', 'Th', 'Oh', 'Ih', 'Dinfh'].includes(group)) return true;
  const axial = /^([CD])(\d+)([hd])$/.exec(group);
  if (axial) {
    const even = Number(axial[2]) % 2 === 0;
    if (axial[3] === 'h') return even;
    return axial[1] === 'D' && !even;
  }
  const improper = /^S(\d+)$/.exec(group);
  return improper !== null && Number(improper[1]) % 4 === 2;
}

/** What a centre of symmetry, or its absence, means for the d–d bands. */
export function centreSentence(group: string | null, dCount: number | null): string | null {
  if (group === null) return null;
  const yes = hasInversion(group);
  const word = yes ? 'yes' : 'no';
  if (dCount === 0 || dCount === 10) return `${word}; d${dCount === 0 ? '⁰' : '¹⁰'} has no d–d bands`;
  return yes ? 'yes: d–d bands are Laporte-forbidden' : 'no: the Laporte rule does not bar d–d bands';
}

/** How a record of the same formula stands to what is about to be registered. */
export interface Relative {
  accession: string;
  /** The same geometry, isomer and hand: a second registration would be refused. */
  same: boolean;
  /** What it differs by, in words. */
  what: string;
}

/** Not stating the hand and stating the pair is one record. */
const hand = (chirality: string | null) => (chirality === 'rac' ? null : chirality);

/** Records of this formula among those found, the same one first. */
export function relativesOf(
  items: readonly ComplexSummary[],
  formula: string,
  { geometry, isomer, chirality }: Pick<Settled, 'geometry' | 'isomer' | 'chirality'>,
  geometryName: (symbol: string) => string,
): Relative[] {
  return items
    .filter((item) => item.formula === formula)
    .map((item) => {
      const other = item.centres.length === 1 ? (item.centres[0]?.geometry ?? null) : null;
      const stated = item.pointGroup !== null;
      const sameForm =
        item.isomer.descriptor === (isomer?.descriptor ?? null) && item.pointGroup === (isomer?.pointGroup ?? null);
      const same = other === geometry && sameForm && hand(item.isomer.chirality) === hand(chirality);
      const form = [item.isomer.chirality, item.isomer.descriptor].filter(Boolean).join('-');
      const isomerWords = form ? `the ${form} isomer` : stated ? 'the one isomer' : 'isomer not stated';
      const geometryWords = other === null ? 'geometry not stated' : geometryName(other);
      return {
        accession: item.accession,
        same,
        what: other === geometry ? isomerWords : `${geometryWords}, ${isomerWords}`,
      };
    })
    .sort((a, b) => Number(b.same) - Number(a.same));
}
