import { and, asc, eq } from 'drizzle-orm';
import type { BandRecord } from '#src/contracts/spectra.ts';
import { bands, centres, complexes, spectra, spectrumSolvents } from '#src/db/schema/index.ts';
import { type BandJudge, canJudge, type SpectrumAccess, seesAsMember } from '#src/server/access/records.ts';
import { bandSight } from '#src/server/access/sight.ts';
import { database } from '#src/server/database.ts';
import { notInSight } from '#src/server/http.ts';
import { namesFor } from './people.ts';
import { verdictOf } from './verdict.ts';

type Band = typeof bands.$inferSelect;

/** Bands of a spectrum that the asker sees, in the order in which they were put. */
export async function describeBands(access: SpectrumAccess): Promise<BandRecord[]> {
  const { asker, spectrum } = access;
  const { db } = await database();
  const rows = await db
    .select({ band: bands })
    .from(bands)
    .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
    .innerJoin(complexes, eq(complexes.id, spectra.complexId))
    .where(and(eq(bands.spectrumId, spectrum.id), bandSight(asker)))
    .orderBy(asc(bands.ordinal), asc(bands.id));
  return describe(
    access,
    rows.map(({ band }) => band),
  );
}

/** The band that was judged, as it is now; also where its new state takes it out of the asker's sight. */
export async function describeJudged(access: BandJudge): Promise<BandRecord> {
  const { db } = await database();
  const rows = await db.select().from(bands).where(eq(bands.id, access.band.id));
  const [record] = await describe(access, rows);
  if (!record) throw notInSight(); // deleted since
  return record;
}

async function describe({ asker, complex, spectrum }: SpectrumAccess, rows: Band[]): Promise<BandRecord[]> {
  if (rows.length === 0) return [];
  const { db } = await database();
  const [centreRows, solvents, judges, nameOf] = await Promise.all([
    db.select().from(centres).where(eq(centres.complexId, spectrum.complexId)),
    db.select().from(spectrumSolvents).where(eq(spectrumSolvents.spectrumId, spectrum.id)),
    canJudge(asker, { complex, spectrum }),
    namesFor(
      db,
      seesAsMember(asker, complex, spectrum),
      rows.flatMap(({ proposedBy, judgedBy }) => [proposedBy, judgedBy]),
    ),
  ]);
  return rows.map((band) => ({
    id: band.id,
    wavenumber: band.wavenumber,
    wavelength: 1e7 / band.wavenumber,
    height: band.height,
    quantity: band.quantity,
    epsilon: band.epsilon,
    fwhm: band.fwhm,
    shoulder: band.shoulder,
    oscillatorStrength: band.oscillatorStrength,
    uncertainty: band.uncertainty,
    found: band.found,
    assignment: assignmentOf(band),
    verdict: verdictOf(band, { centres: centreRows, solvents }),
    state: band.state,
    proposedBy: nameOf(band.proposedBy),
    judgedBy: nameOf(band.judgedBy),
    judgement: band.judgement,
    may: { judge: judges && band.proposedBy !== asker.accountId && spectrum.state !== 'withdrawn' },
  }));
}

function assignmentOf({ class: kind, centreOrdinal, ligand, from, to, reason }: Band): BandRecord['assignment'] {
  return {
    class: kind,
    ...(centreOrdinal === null ? {} : { centre: centreOrdinal }),
    ...(ligand === null ? {} : { ligand }),
    ...(from === null ? {} : { from }),
    ...(to === null ? {} : { to }),
    ...(reason === null ? {} : { reason }),
  };
}
