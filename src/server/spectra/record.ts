import { and, eq } from 'drizzle-orm';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';
import { complexes, files, instruments, labs, spectra, spectrumSpecies } from '#src/db/schema/index.ts';
import {
  canChangeSpectrum,
  canJudge,
  canPropose,
  canTakeSpectrum,
  type SpectrumAccess,
  seesAsMember,
} from '#src/server/access/records.ts';
import { complexSight } from '#src/server/access/sight.ts';
import { database } from '#src/server/database.ts';
import { notInSight } from '#src/server/http.ts';
import { describeBands } from './band-record.ts';
import { cautionsOf } from './cautions.ts';
import { fitOf } from './fit-history.ts';
import { solventsOf, summaryColumns, summaryOf } from './summary.ts';

/** A spectrum with its conditions and bands, as this asker gets it. */
export async function describeSpectrum(access: SpectrumAccess): Promise<SpectrumRecord> {
  const { asker } = access;
  const { id } = access.spectrum;
  const { db } = await database();
  const [row] = await db
    .select({ ...summaryColumns(asker), size: files.size, instrument: { id: instruments.id, name: instruments.name } })
    .from(spectra)
    .innerJoin(complexes, eq(complexes.id, spectra.complexId))
    .innerJoin(labs, eq(labs.id, spectra.labId))
    .innerJoin(files, eq(files.sha256, spectra.fileSha256))
    .leftJoin(instruments, eq(instruments.id, spectra.instrumentId))
    .where(eq(spectra.id, id));
  if (!row) throw notInSight(); // deleted since the asker's sight was judged
  const { spectrum } = row;
  const fresh = { ...access, spectrum };
  const [solventOf, species, bands, download, attest] = await Promise.all([
    solventsOf(db, [id]),
    speciesInSight(access),
    describeBands(fresh),
    canTakeSpectrum(asker, id),
    canJudge(asker, fresh),
  ]);
  const solvent = solventOf(id);
  const { pH, ionicStrength, electrolyte, atmosphere, age } = spectrum;
  return {
    ...summaryOf(row, solvent),
    medium: { pH, ionicStrength, electrolyte, atmosphere, age },
    phase: spectrum.phase,
    concentrationUncertainty: spectrum.concentrationUncertainty,
    pathLengthUncertainty: spectrum.pathLengthUncertainty,
    k: 1,
    weighing: spectrum.weighing,
    bandwidth: spectrum.bandwidth,
    cell: spectrum.cell,
    polarisation: spectrum.polarisation,
    species,
    instrument: row.instrument,
    operator: seesAsMember(asker, fresh.complex, spectrum) ? spectrum.operator : null,
    visibility: spectrum.visibility,
    notes: seesAsMember(asker, fresh.complex, spectrum) ? spectrum.notes : null,
    withdrawnReason: spectrum.withdrawnReason,
    fileName: spectrum.fileName,
    sha256: spectrum.fileSha256,
    block: spectrum.block,
    column: spectrum.column,
    size: row.size,
    xUnit: spectrum.xUnit,
    yUnit: spectrum.yUnit,
    reading: spectrum.reading,
    warnings: spectrum.warnings,
    bands,
    fit: seesAsMember(asker, fresh.complex, spectrum) ? fitOf(spectrum.history) : null,
    cautions: await cautionsOf(fresh, solvent),
    may: {
      change: canChangeSpectrum(asker, spectrum),
      propose: canPropose(asker, fresh) && spectrum.state !== 'withdrawn',
      attest: attest && spectrum.state !== 'withdrawn',
      download,
    },
  };
}

/** Species whose complexes the asker sees: another one in the mixture is not told. */
async function speciesInSight({ asker, spectrum }: SpectrumAccess): Promise<SpectrumRecord['species']> {
  const { db } = await database();
  return db
    .select({
      accession: complexes.accession,
      fraction: spectrumSpecies.fraction,
      basis: spectrumSpecies.basis,
    })
    .from(spectrumSpecies)
    .innerJoin(complexes, eq(complexes.id, spectrumSpecies.complexId))
    .where(and(eq(spectrumSpecies.spectrumId, spectrum.id), complexSight(asker)));
}
