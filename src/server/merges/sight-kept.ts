import type { complexes, spectra } from '#src/db/schema/index.ts';

// What merging and moving must not do: bring anything into the sight of somebody who could not see it before. A record
// of a lab is seen by its people; a spectrum or a preparation by its own visibility, and only with its complex.

type Complex = Pick<typeof complexes.$inferSelect, 'visibility' | 'labId' | 'embargoUntil'>;
type Part = Pick<typeof spectra.$inferSelect, 'visibility' | 'labId'>;

/** Whether everybody who sees the one sees the other, too, as members. */
export const seenByAllWhoSee = (seen: Complex, other: Complex): boolean =>
  seen.visibility === 'programme' || (other.visibility === 'lab' && seen.labId === other.labId);

/**
 * The visibility of a spectrum or preparation under another complex, so that nobody new sees it.
 *
 * @returns null where no visibility keeps it from everybody who did not see it
 */
export function visibilityUnder(part: Part, from: Complex, into: Complex): Part['visibility'] | null {
  if (seenByAllWhoSee(from, into)) return part.visibility;
  // What only one lab saw stays with that lab where it is also the part's own.
  return into.visibility === 'programme' && part.labId === from.labId ? 'lab' : null;
}

/** The end of an embargo that holds at `now`, else an empty text, which is before every instant. */
export const embargoInForce = ({ embargoUntil }: Complex, now: string): string =>
  embargoUntil && embargoUntil > now ? embargoUntil : '';
