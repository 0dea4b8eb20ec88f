import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';
import { type ComplexAccess, seeSpectrum } from '#src/server/access/records.ts';
import { describeBands } from './band-record.ts';
import { listSpectra } from './list.ts';

/** Spectra that a page of a complex is drawn with; the overlay of more would be read by nobody. */
const MOST = 100;

/** The spectra of a complex with their bands, as this asker sees them: what its page is drawn with. */
export async function firstSpectra({ asker, complex }: ComplexAccess): Promise<{
  spectra: SpectrumSummary[];
  totalSpectra: number;
  bands: Record<string, BandRecord[]>;
}> {
  const { items, total } = await listSpectra(asker, {
    complex: complex.accession,
    limit: MOST,
    sort: '-created',
    facets: '0',
  });
  const withBands = items.filter(({ bandCount }) => bandCount > 0);
  const bands = await Promise.all(
    withBands.map(async ({ id }) => [id, await describeBands(await seeSpectrum(asker, id))] as const),
  );
  return { spectra: items, totalSpectra: total, bands: Object.fromEntries(bands) };
}
