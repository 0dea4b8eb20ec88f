/** Complexes, folios and grants made straight in the database, for tests of spectra alone. */
import { formatAccession } from '#src/contracts/accession.ts';

let lastNumber = 700;

/** A complex of one centre; the formula is as given and nothing is derived from it. */
export async function complex(
  labId: string,
  makerId: string,
  {
    formula = '[Ni(OH2)6]2+',
    element = 'Ni',
    group = 10,
    dCount = 8,
    visibility = 'programme' as 'programme' | 'lab',
  } = {},
): Promise<{ id: string; accession: string }> {
  const { database } = await import('#src/server/database.ts');
  const { newId, nowIso } = await import('#src/server/ids.ts');
  const { centres, complexes } = await import('#src/db/schema/index.ts');
  const id = newId();
  const number = ++lastNumber;
  const accession = formatAccession('ZF', number);
  const createdAt = nowIso();
  await (await database()).write(async (tx) => {
    await tx.insert(complexes).values({
      id,
      number,
      accession,
      identityKey: `key ${number}`,
      formula,
      charge: 2,
      hill: 'H12NiO6',
      composition: { H: 12, Ni: 1, O: 6 },
      molarMass: 166.78,
      labId,
      makerId,
      state: 'registered',
      visibility,
      search: formula.toLowerCase(),
      createdAt,
      updatedAt: createdAt,
    });
    await tx.insert(centres).values({
      complexId: id,
      ordinal: 0,
      element,
      group,
      oxidationState: 2,
      dCount,
      coordinationNumber: 6,
      geometry: 'OC-6',
      geometryBasis: 'assumed',
    });
  });
  return { id, accession };
}

/** A folio over one complex, granted to an account. */
export async function share(
  { labId, makerId, complexId, guestId }: { labId: string; makerId: string; complexId: string; guestId: string },
  { level = 'view' as 'view' | 'download', shows = 'proposed' as 'attested' | 'proposed' } = {},
): Promise<void> {
  const { database } = await import('#src/server/database.ts');
  const { newId, nowIso } = await import('#src/server/ids.ts');
  const { folioItems, folios, grants } = await import('#src/db/schema/index.ts');
  const folioId = newId();
  const createdAt = nowIso();
  await (await database()).write(async (tx) => {
    await tx.insert(folios).values({
      id: folioId,
      name: 'For a partner',
      labId,
      makerId,
      licence: 'CC-BY-4.0',
      shows,
      createdAt,
      updatedAt: createdAt,
    });
    await tx.insert(folioItems).values({ folioId, complexId, ordinal: 0, spectra: null });
    await tx.insert(grants).values({
      id: newId(),
      folioId,
      accountId: guestId,
      level,
      expiresAt: '2999-01-01T00:00:00.000Z',
      grantedBy: makerId,
      createdAt,
    });
  });
}
