import { and, asc, eq, inArray } from 'drizzle-orm';
import type { ComplexSummary } from '../../contracts/complexes.ts';
import { bands, centres, complexes, complexLigands, labs, spectra } from '../../db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { bandSight, spectrumSight } from '../access/sight.ts';
import { database } from '../database.ts';

type ComplexRow = typeof complexes.$inferSelect;

function grouped<Row, Key>(rows: Row[], keyOf: (row: Row) => Key): Map<Key, Row[]> {
  const groups = new Map<Key, Row[]>();
  for (const row of rows) {
    const group = groups.get(keyOf(row));
    if (group) group.push(row);
    else groups.set(keyOf(row), [row]);
  }
  return groups;
}

/** A centre as the wire has it. */
const toCentre = (row: typeof centres.$inferSelect): ComplexSummary['centres'][number] => ({
  element: row.element,
  group: row.group,
  oxidationState: { value: row.oxidationState, nominal: row.nominal, alternatives: row.alternatives },
  dCount: row.dCount,
  geometry: row.geometry,
  geometryBasis: row.geometryBasis,
  spinState: row.spinState,
  groundTerm: row.groundTerm && row.groundTermGroup ? { label: row.groundTerm, group: row.groundTermGroup } : null,
});

/**
 * Complexes as a list gives them, in the order given: what hangs on each is fetched for all at once, and only as far
 * as the asker sees.
 *
 * The strip is that of the one spectrum with most bands (the latest of several): the bands of two labs laid over each
 * other would show every band twice.
 */
export async function summaries(asker: Asker, rows: readonly ComplexRow[]): Promise<ComplexSummary[]> {
  if (rows.length === 0) return [];
  const { db } = await database();
  const ids = rows.map((row) => row.id);
  const [centreRows, ligandRows, labRows, spectrumRows, bandRows] = await Promise.all([
    db.select().from(centres).where(inArray(centres.complexId, ids)).orderBy(asc(centres.ordinal)),
    db.select().from(complexLigands).where(inArray(complexLigands.complexId, ids)).orderBy(asc(complexLigands.ordinal)),
    db.select({ id: labs.id, name: labs.name }).from(labs),
    db
      .select({
        id: spectra.id,
        complexId: spectra.complexId,
        labId: spectra.labId,
        colour: spectra.colour,
        state: spectra.state,
      })
      .from(spectra)
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .where(and(inArray(spectra.complexId, ids), spectrumSight(asker)))
      .orderBy(asc(spectra.id)),
    db
      .select({
        spectrumId: spectra.id,
        complexId: spectra.complexId,
        wavenumber: bands.wavenumber,
        epsilon: bands.epsilon,
        class: bands.class,
      })
      .from(bands)
      .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .where(and(inArray(spectra.complexId, ids), eq(spectra.state, 'registered'), bandSight(asker)))
      .orderBy(asc(spectra.id), asc(bands.wavenumber)),
  ]);
  const centresOf = grouped(centreRows, (row) => row.complexId);
  const ligandsOf = grouped(ligandRows, (row) => row.complexId);
  const spectraOf = grouped(
    spectrumRows.filter((row) => row.state === 'registered'),
    (row) => row.complexId,
  );
  const bandsOf = grouped(bandRows, (row) => row.complexId);
  const labName = new Map(labRows.map((lab) => [lab.id, lab.name]));

  return rows.map((row) => {
    const own = spectraOf.get(row.id) ?? [];
    const bySpectrum = [...grouped(bandsOf.get(row.id) ?? [], (band) => band.spectrumId).values()];
    const strip = bySpectrum.reduce<typeof bandRows>((best, some) => (some.length >= best.length ? some : best), []);
    return {
      accession: row.accession,
      formula: row.formula,
      charge: row.charge,
      hill: row.hill,
      molarMass: row.molarMass,
      extent: row.extent,
      centres: (centresOf.get(row.id) ?? []).map(toCentre),
      ligands: (ligandsOf.get(row.id) ?? []).map(({ abbreviation, count }) => ({ abbreviation, count })),
      isomer: { descriptor: row.descriptor, chirality: row.chirality, sites: row.sites, chelates: row.chelates },
      pointGroup: row.pointGroup,
      donorSetGroup: row.donorSetGroup,
      effectiveGroup: row.effectiveGroup,
      state: row.state,
      lab: { id: row.labId, name: labName.get(row.labId) ?? '' },
      labs: new Set(own.map((spectrum) => spectrum.labId)).size,
      spectra: own.length,
      strip: strip.map(({ wavenumber, epsilon, class: bandClass }) => ({ wavenumber, epsilon, class: bandClass })),
      colour: own.findLast((spectrum) => spectrum.colour !== null)?.colour ?? null,
      visibility: row.visibility,
      embargoUntil: row.embargoUntil,
      updatedAt: row.updatedAt,
    };
  });
}
