import { eq, inArray, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import type { Db } from '#src/db/client.ts';
import {
  accessTokens,
  accounts,
  bands,
  bundles,
  complexes,
  folios,
  invitations,
  labs,
  preparations,
  spectra,
} from '#src/db/schema/index.ts';

export interface Subject {
  type: string;
  id: string;
  label: string | null;
  href: string | null;
}
type Named = Omit<Subject, 'type'>;
type Namer = (db: Db, ids: string[]) => Promise<Named[]>;

const named = (complex: { accession: string; formula: string }) => `${complex.accession} ${complex.formula}`;
const home = alias(complexes, 'home');

/** What records are called by people, by kind. */
const NAMERS: Record<string, Namer> = {
  complex: async (db, ids) =>
    (await db.select().from(complexes).where(inArray(complexes.id, ids))).map((row) => ({
      id: row.id,
      label: named(row),
      href: `/complexes/${row.accession}`,
    })),
  preparation: async (db, ids) =>
    (
      await db
        .select({ id: preparations.id, label: preparations.label, accession: home.accession })
        .from(preparations)
        .innerJoin(home, eq(home.id, preparations.complexId))
        .where(inArray(preparations.id, ids))
    ).map(({ id, label, accession }) => ({
      id,
      label: `${label} of ${accession}`,
      href: `/complexes/${accession}`,
    })),
  spectrum: async (db, ids) =>
    (
      await db
        .select({ id: spectra.id, title: spectra.title, accession: home.accession })
        .from(spectra)
        .innerJoin(home, eq(home.id, spectra.complexId))
        .where(inArray(spectra.id, ids))
    ).map(({ id, title, accession }) => ({ id, label: `${title} (${accession})`, href: `/spectra/${id}` })),
  band: async (db, ids) =>
    (
      await db
        .select({ id: bands.id, wavenumber: bands.wavenumber, spectrum: spectra.id, title: spectra.title })
        .from(bands)
        .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
        .where(inArray(bands.id, ids))
    ).map(({ id, wavenumber, spectrum, title }) => ({
      id,
      label: `${atWavenumber(wavenumber)} of ${title}`,
      href: `/spectra/${spectrum}`,
    })),
  folio: async (db, ids) =>
    (await db.select().from(folios).where(inArray(folios.id, ids))).map(({ id, name }) => ({
      id,
      label: name,
      href: `/folios/${id}`,
    })),
  bundle: async (db, ids) =>
    (
      await db
        .select({ id: bundles.id, folio: folios.id, name: folios.name, accessions: bundles.complexes })
        .from(bundles)
        .leftJoin(folios, eq(folios.id, bundles.folioId))
        .where(inArray(bundles.id, ids))
    ).map(({ id, folio, name, accessions }) => ({
      id,
      label: name ? `bundle of ${name}` : `bundle of ${countOf(accessions?.length ?? 0, 'complex', 'complexes')}`,
      href: folio ? `/folios/${folio}` : null,
    })),
  account: async (db, ids) =>
    (await db.select().from(accounts).where(inArray(accounts.id, ids))).map(({ id, name, email }) => ({
      id,
      label: `${name}, ${email}`,
      href: null,
    })),
  lab: async (db, ids) =>
    (await db.select().from(labs).where(inArray(labs.id, ids))).map(({ id, name }) => ({
      id,
      label: name,
      href: `/labs/${id}`,
    })),
  invitation: async (db, ids) =>
    (
      await db
        .select({ id: invitations.id, email: invitations.email, lab: labs.name, folio: folios.name })
        .from(invitations)
        .leftJoin(labs, eq(labs.id, invitations.labId))
        .leftJoin(folios, eq(folios.id, invitations.folioId))
        .where(inArray(invitations.id, ids))
    ).map(({ id, email, lab, folio }) => ({ id, label: `${email} to ${lab ?? folio ?? 'the registry'}`, href: null })),
  token: async (db, ids) =>
    (
      await db
        .select({ id: accessTokens.id, name: accessTokens.name, owner: accounts.name })
        .from(accessTokens)
        .innerJoin(accounts, eq(accounts.id, accessTokens.accountId))
        .where(inArray(accessTokens.id, ids))
    ).map(({ id, name, owner }) => ({ id, label: `${name} of ${owner}`, href: null })),
};

/** "17 400 cm⁻¹", the thousands apart by a narrow space. */
const atWavenumber = (wavenumber: number): string =>
  `${Math.round(wavenumber)
    .toString()
    .replace(/\B(?=(?:\d{3})+$)/g, '\u202f')} cm⁻¹`;

const countOf = (count: number, one: string, many: string) => `${count} ${count === 1 ? one : many}`;

/** The records of some rows by what people call them; null for one that is gone. One query for each kind. */
export async function nameSubjects(
  db: Db,
  wanted: readonly { type: string; id: string }[],
): Promise<(type: string, id: string) => Subject> {
  const idsOf = new Map<string, Set<string>>();
  for (const { type, id } of wanted) idsOf.set(type, (idsOf.get(type) ?? new Set()).add(id));
  const found = new Map<string, Named>();
  await Promise.all(
    [...idsOf].map(async ([type, ids]) => {
      for (const one of (await NAMERS[type]?.(db, [...ids])) ?? []) found.set(`${type} ${one.id}`, one);
    }),
  );
  return (type, id) => ({ type, ...(found.get(`${type} ${id}`) ?? { id, label: null, href: null }) });
}

/** Ids of the records of a kind whose name holds a text, as a query, for searching. */
export const subjectIdsLike = (pattern: string) => sql`(
  select ${complexes.id} from ${complexes} where ${complexes.accession} like ${pattern} escape '\\' or ${complexes.formula} like ${pattern} escape '\\'
  union all select ${spectra.id} from ${spectra} where ${spectra.title} like ${pattern} escape '\\'
  union all select ${preparations.id} from ${preparations} where ${preparations.label} like ${pattern} escape '\\'
  union all select ${folios.id} from ${folios} where ${folios.name} like ${pattern} escape '\\'
  union all select ${labs.id} from ${labs} where ${labs.name} like ${pattern} escape '\\'
  union all select ${accounts.id} from ${accounts} where ${accounts.name} like ${pattern} escape '\\' or ${accounts.email} like ${pattern} escape '\\'
  union all select ${invitations.id} from ${invitations} where ${invitations.email} like ${pattern} escape '\\'
  union all select ${accessTokens.id} from ${accessTokens} where ${accessTokens.name} like ${pattern} escape '\\'
)`;
