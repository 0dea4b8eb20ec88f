import { and, eq } from 'drizzle-orm';
import type { SpectrumMetadata } from '#src/contracts/spectra.ts';
import type { Db, Tx } from '#src/db/client.ts';
import { complexes, files, spectra, spectrumPoints } from '#src/db/schema/index.ts';
import type { Asker } from '#src/server/access/asker.ts';
import { seeSpectrum } from '#src/server/access/records.ts';
import { spectrumSight } from '#src/server/access/sight.ts';
import { database } from '#src/server/database.ts';
import { HttpError } from '#src/server/http.ts';
import { newId, nowIso } from '#src/server/ids.ts';
import { record } from '#src/server/trail.ts';
import { colourOf, flagsOf } from './checks.ts';
import {
  absorbanceLimitOf,
  conditionColumns,
  replaceParts,
  type SolventShare,
  type SpeciesRow,
  solventShares,
} from './conditions.ts';
import type { Upload } from './multipart.ts';
import { keepOriginal } from './original.ts';
import { storedValues } from './quantities.ts';
import { type ReadCurve, readCurve } from './read-curve.ts';
import { describeSpectrum } from './record.ts';
import { pack } from './stored-points.ts';
import type { UploadTarget } from './target.ts';

/**
 * Read an upload, keep the file and make the record.
 *
 * @throws {HttpError} 409 when the same bytes, block and column are on this complex in the asker's sight, 422, 503
 * @throws {DomainError} where the file cannot be read
 */
export async function createSpectrum(target: UploadTarget, upload: Upload, metadata: SpectrumMetadata) {
  const { asker, complex } = target;
  const curve = await readCurve(upload.bytes, metadata);
  const { db, write } = await database();
  await refuseDuplicate(db, asker, complex.id, upload.sha256, curve);

  const id = newId();
  const row = await spectrumRow(id, target, upload, metadata, curve);
  // The bytes are in the store before any row tells of them, so that what was acknowledged is there whatever happens
  // next. An object without a row, left by a crash between the two, harms nobody: the next upload of it is the same.
  await keepOriginal(upload.sha256, upload.bytes);
  await write(async (tx) => {
    await refuseDuplicate(tx, asker, complex.id, upload.sha256, curve);
    await tx
      .insert(files)
      .values({ sha256: upload.sha256, size: upload.bytes.byteLength, createdAt: row.spectrum.createdAt })
      .onConflictDoNothing();
    await tx.insert(spectra).values(row.spectrum);
    await replaceParts(tx, id, row);
    await tx.insert(spectrumPoints).values(row.points);
    await record(tx, asker, {
      action: 'upload',
      subjectType: 'spectrum',
      subjectId: id,
      detail: { complex: complex.accession, sha256: upload.sha256, block: curve.block, column: curve.column },
    });
  });
  return describeSpectrum(await seeSpectrum(asker, id));
}

async function refuseDuplicate(
  db: Db | Tx,
  asker: Asker,
  complexId: string,
  sha256: string,
  { block, column }: ReadCurve,
): Promise<void> {
  const [first] = await db
    .select({ id: spectra.id })
    .from(spectra)
    .innerJoin(complexes, eq(complexes.id, spectra.complexId))
    .where(
      and(
        eq(spectra.complexId, complexId),
        eq(spectra.fileSha256, sha256),
        eq(spectra.block, block),
        eq(spectra.column, column),
        spectrumSight(asker),
      ),
    )
    .limit(1);
  if (first)
    throw new HttpError(409, 'This spectrum of this file is on this complex already', { members: { id: first.id } });
}

async function spectrumRow(
  id: string,
  { asker, complex, preparationId, labId, species }: UploadTarget,
  upload: Upload,
  metadata: SpectrumMetadata,
  curve: ReadCurve,
) {
  const now = nowIso();
  const columns = conditionColumns(metadata);
  const { technique } = metadata;
  const { xUnit, yUnit, wavenumber } = curve;
  const inFileOrder = storedValues(curve.y, technique, yUnit);
  const value = Float64Array.from(curve.order, (place) => inFileOrder[place]!);
  const solvents: SolventShare[] = solventShares(metadata.solvent) ?? [];
  const checked = {
    technique,
    yUnit,
    solvents,
    concentration: columns.concentration ?? null,
    pathLength: columns.pathLength ?? null,
    absorbanceLimit: await absorbanceLimitOf(columns.instrumentId),
  };
  const shown = { x: wavenumber, value };
  const rows: SpeciesRow[] = species;
  return {
    spectrum: {
      ...columns,
      id,
      complexId: complex.id,
      preparationId,
      labId,
      makerId: asker.accountId,
      title: metadata.title || curve.title.trim().slice(0, 200) || upload.fileName,
      technique,
      synthetic: metadata.synthetic ?? false,
      fileSha256: upload.sha256,
      fileName: upload.fileName,
      block: curve.block,
      column: curve.column,
      reading: curve.reading,
      xUnit,
      yUnit,
      points: curve.x.length,
      xMin: wavenumber[0]!,
      xMax: wavenumber.at(-1)!,
      colour: colourOf(shown, checked),
      warnings: curve.warnings,
      flags: flagsOf(shown, checked),
      state: metadata.state ?? ('registered' as const),
      createdAt: now,
      updatedAt: now,
    },
    solvents,
    species: rows,
    points: {
      spectrumId: id,
      x: pack(curve.x),
      y: pack(curve.y),
      wavenumber: pack(wavenumber),
      value: pack(value),
    },
  };
}
