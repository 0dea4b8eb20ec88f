import { asc, inArray, sql } from 'drizzle-orm';
import type { SpectrumSummary } from '#src/contracts/spectra.ts';
import type { Db } from '#src/db/client.ts';
import { bands, complexes, labs, preparations, spectra, spectrumSolvents } from '#src/db/schema/index.ts';
import type { Asker } from '#src/server/access/asker.ts';
import { bandSight, preparationSight } from '#src/server/access/sight.ts';

/** What a summary is made of. A query that selects it has `complex`, `spectrum` and `lab` in its FROM. */
export function summaryColumns(asker: Asker) {
  return {
    spectrum: spectra,
    complex: { accession: complexes.accession, formula: complexes.formula },
    lab: { id: labs.id, name: labs.name },
    bandCount: sql<number>`(select count(*) from ${bands} where ${bands.spectrumId} = ${spectra.id} and ${bandSight(asker)})`,
    // A preparation may be of narrower sight than the spectrum that was measured on it.
    preparationId: sql<
      string | null
    >`(select ${preparations.id} from ${preparations} where ${preparations.id} = ${spectra.preparationId} and ${preparationSight(asker)})`,
  };
}

export interface SummaryRow {
  spectrum: typeof spectra.$inferSelect;
  complex: { accession: string; formula: string };
  lab: { id: string; name: string };
  bandCount: number;
  preparationId: string | null;
}

export type Solvents = SpectrumSummary['solvent'];

/** Solvents of several spectra, by the spectrum's id. */
export async function solventsOf(db: Db, ids: string[]): Promise<(id: string) => Solvents> {
  const rows =
    ids.length === 0
      ? []
      : await db
          .select()
          .from(spectrumSolvents)
          .where(inArray(spectrumSolvents.spectrumId, ids))
          .orderBy(asc(spectrumSolvents.ordinal));
  const bySpectrum = new Map<string, Solvents>();
  for (const { spectrumId, name, volumeFraction } of rows)
    bySpectrum.set(spectrumId, [...(bySpectrum.get(spectrumId) ?? []), { name, volumeFraction }]);
  return (id) => bySpectrum.get(id) ?? [];
}

/** A spectrum as a list gives it. */
export function summaryOf(row: SummaryRow, solvent: Solvents): SpectrumSummary {
  const { spectrum } = row;
  return {
    id: spectrum.id,
    complex: row.complex.accession,
    formula: row.complex.formula,
    preparation: row.preparationId,
    lab: row.lab,
    title: spectrum.title,
    technique: spectrum.technique,
    solvent,
    concentration: spectrum.concentration,
    pathLength: spectrum.pathLength,
    temperature: spectrum.temperature,
    points: spectrum.points,
    xMin: spectrum.xMin,
    xMax: spectrum.xMax,
    synthetic: spectrum.synthetic,
    colour: spectrum.colour,
    flags: spectrum.flags,
    bandCount: row.bandCount,
    state: spectrum.state,
    measuredAt: spectrum.measuredAt,
    createdAt: spectrum.createdAt,
  };
}
