import { createHash } from 'node:crypto';

/** Little-endian float64, as the table of points holds them. */
const blob = (values: number[]) => Buffer.from(new Float64Array(values).buffer);

interface Owner {
  lab: string;
  maker: string;
}

/** A registered complex straight in the database: these tests are of who sees it, not of how it is read. */
export async function complex(
  { lab, maker }: Owner,
  number: number,
  more: { visibility?: 'programme' | 'lab'; embargoUntil?: string; formula?: string } = {},
): Promise<{ id: string; accession: string }> {
  const { database } = await import('#src/server/database.ts');
  const { newId } = await import('#src/server/ids.ts');
  const { formatAccession } = await import('#src/contracts/accession.ts');
  const { centres, complexes, complexLigands } = await import('#src/db/schema/index.ts');
  const id = newId();
  const accession = formatAccession('ZF', number);
  const at = '2026-11-02T08:00:00.000Z';
  await (await database()).write(async (tx) => {
    await tx.insert(complexes).values({
      id,
      number,
      accession,
      identityKey: `test ${number}`,
      formula: '[Ni(OH2)6]2+',
      charge: 2,
      hill: 'H12NiO6',
      composition: { H: 12, Ni: 1, O: 6 },
      molarMass: 166.78,
      labId: lab,
      makerId: maker,
      state: 'registered',
      search: accession.toLowerCase(),
      createdAt: at,
      updatedAt: at,
      ...more,
    });
    await tx.insert(centres).values({
      complexId: id,
      ordinal: 0,
      element: 'Ni',
      group: 10,
      oxidationState: 2,
      dCount: 8,
      geometry: 'OC-6',
      geometryBasis: 'found',
    });
    await tx.insert(complexLigands).values({
      complexId: id,
      ordinal: 0,
      abbreviation: 'OH2',
      count: 6,
      charge: 0,
      denticity: 1,
      donors: ['O'],
    });
  });
  return { id, accession };
}

/** A spectrum of invented points with its original file in the store, and one proposed band. */
export async function spectrum(
  { lab, maker }: Owner,
  complexId: string,
  more: { visibility?: 'programme' | 'lab'; title?: string; fileName?: string; text?: string; points?: number } = {},
): Promise<{ id: string; bytes: Buffer; band: string }> {
  const { database } = await import('#src/server/database.ts');
  const { newId } = await import('#src/server/ids.ts');
  const { store } = await import('#src/server/store.ts');
  const { bands, files, spectra, spectrumPoints, spectrumSolvents } = await import('#src/db/schema/index.ts');
  const { text, points = 5, ...columns } = more;
  const nm = Array.from({ length: points }, (_, i) => 400 + i * 10);
  const absorbance = nm.map((x, i) =>
    i === 1 ? Number.NaN : Number((0.5 * Math.exp(-(((x - 420) / 30) ** 2))).toFixed(4)),
  );
  const rows = nm.map((x, i) => `${x},${Number.isNaN(absorbance[i]) ? '' : absorbance[i]}`);
  const bytes = Buffer.from(text ?? `wavelength / nm,absorbance\r\n${rows.join('\r\n')}\r\n# invented for a test\r\n`);
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  const [id, band] = [newId(), newId()];
  const at = '2026-11-03T09:30:00.000Z';
  await store().put(`originals/${sha256}`, bytes);
  await (await database()).write(async (tx) => {
    await tx.insert(files).values({ sha256, size: bytes.length, createdAt: at }).onConflictDoNothing();
    await tx.insert(spectra).values({
      id,
      complexId,
      labId: lab,
      makerId: maker,
      title: 'Nickel in water',
      technique: 'solution',
      concentration: 0.05,
      pathLength: 1,
      temperature: 298,
      fileSha256: sha256,
      fileName: 'nickel.csv',
      xUnit: 'nm',
      yUnit: 'absorbance',
      points,
      xMin: 1e7 / nm.at(-1)!,
      xMax: 1e7 / nm[0]!,
      synthetic: true,
      createdAt: at,
      updatedAt: at,
      ...columns,
    });
    await tx.insert(spectrumSolvents).values({ spectrumId: id, ordinal: 0, name: 'water', volumeFraction: 1 });
    await tx.insert(spectrumPoints).values({
      spectrumId: id,
      x: blob(nm),
      y: blob(absorbance),
      wavenumber: blob(nm.map((x) => 1e7 / x).reverse()),
      value: blob([...absorbance].reverse()),
    });
    await tx.insert(bands).values({
      id: band,
      spectrumId: id,
      ordinal: 0,
      wavenumber: 25_300,
      height: 0.26,
      quantity: 'absorbance',
      epsilon: 5.2,
      found: 'typed',
      class: 'd-d',
      from: '3A2g',
      to: '3T1g(P)',
      reason: '=1+1',
      proposedBy: maker,
    });
  });
  return { id, bytes, band };
}

/** A live grant, straight in the database. */
export async function grant(
  folioId: string,
  accountId: string,
  level: 'view' | 'download',
  by: string,
  expiresAt = '2999-01-01T00:00:00.000Z',
): Promise<string> {
  const { database } = await import('#src/server/database.ts');
  const { newId, nowIso } = await import('#src/server/ids.ts');
  const { grants } = await import('#src/db/schema/index.ts');
  const id = newId();
  const row = { id, folioId, accountId, level, expiresAt, grantedBy: by, createdAt: nowIso() };
  await (await database()).write((tx) => tx.insert(grants).values(row));
  return id;
}

/** The token in the link of the last mail to an address. */
export async function mailedToken(to: string): Promise<string> {
  const { database } = await import('#src/server/database.ts');
  const { mails } = await import('#src/db/schema/index.ts');
  const { desc, eq } = await import('drizzle-orm');
  const { db } = await database();
  const [mail] = await db.select().from(mails).where(eq(mails.to, to)).orderBy(desc(mails.id)).limit(1);
  const token = /\/join#(\S+)/.exec(mail?.text ?? '')?.[1];
  if (!token) throw new Error(`no invitation was mailed to ${to}`);
  return token;
}
