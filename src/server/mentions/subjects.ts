import { and, eq } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { bands, complexes, preparations, spectra } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { bandSight, complexSight, preparationSight } from '../access/sight.ts';
import { settings } from '../settings.ts';

/** What a text is about, and which text of it. */
export interface Subject {
  type: 'complex' | 'preparation' | 'band';
  id: string;
  /** Set where the text is a judgement of the band, not its reason. */
  judgement?: boolean;
}

/** Where a person may read the text: in words, with formula and accession alone of what the record holds, and a link. */
export interface Place {
  where: string;
  link: string;
}

const complexFacts = { accession: complexes.accession, formula: complexes.formula };

/** The place of a text as one person sees it, within the transaction that writes it; null when out of their sight. */
export async function placeFor(tx: Tx, reader: Asker, { type, id, judgement }: Subject): Promise<Place | null> {
  if (type === 'band') {
    const [row] = await tx
      .select({ ...complexFacts, spectrum: spectra.id })
      .from(bands)
      .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .where(and(eq(bands.id, id), bandSight(reader)));
    const what = judgement ? 'the judgement of' : 'the assignment of';
    return row ? placed(`${what} a band of`, row, `/spectra/${row.spectrum}`) : null;
  }
  const row = type === 'complex' ? await seenComplex(tx, reader, id) : await preparedComplex(tx, reader, id);
  const what = type === 'complex' ? 'the notes of' : 'the notes of a preparation of';
  return row ? placed(what, row, `/complexes/${row.accession}`) : null;
}

const placed = (what: string, { formula, accession }: { formula: string; accession: string }, path: string): Place => ({
  where: `${what} ${formula} (${accession})`,
  link: `${settings().publicOrigin}${path}`,
});

async function seenComplex(tx: Tx, reader: Asker, id: string) {
  const [row] = await tx
    .select(complexFacts)
    .from(complexes)
    .where(and(eq(complexes.id, id), complexSight(reader)));
  return row;
}

async function preparedComplex(tx: Tx, reader: Asker, id: string) {
  const [row] = await tx
    .select(complexFacts)
    .from(preparations)
    .innerJoin(complexes, eq(complexes.id, preparations.complexId))
    .where(and(eq(preparations.id, id), preparationSight(reader)));
  return row;
}
