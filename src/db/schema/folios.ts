import { index, integer, primaryKey, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { accounts, labs } from './accounts.ts';
import { complexes } from './complexes.ts';

/** A set of complexes and spectra shared as one. */
export const folios = sqliteTable(
  'folio',
  {
    id: text().primaryKey(),
    name: text().notNull(),
    description: text(),
    labId: text()
      .notNull()
      .references(() => labs.id),
    makerId: text()
      .notNull()
      .references(() => accounts.id),
    /** SPDX identifier; nothing is handed out without one. */
    licence: text().notNull(),
    embargoUntil: text(),
    /** Whether guests see attested bands only, or proposed ones too. */
    shows: text({ enum: ['attested', 'proposed'] }).notNull(),
    version: integer().notNull().default(1),
    createdAt: text().notNull(),
    updatedAt: text().notNull(),
  },
  (t) => [index('folio_lab').on(t.labId)],
);

export const folioItems = sqliteTable(
  'folio_item',
  {
    folioId: text()
      .notNull()
      .references(() => folios.id),
    complexId: text()
      .notNull()
      .references(() => complexes.id),
    ordinal: integer().notNull(),
    /** Ids of the spectra shared, or null for all of the complex that a member of the folio's lab may see. */
    spectra: text({ mode: 'json' }).$type<string[] | null>(),
  },
  (t) => [primaryKey({ columns: [t.folioId, t.complexId] }), index('folio_item_complex').on(t.complexId)],
);

export const grants = sqliteTable(
  'grant',
  {
    id: text().primaryKey(),
    folioId: text()
      .notNull()
      .references(() => folios.id),
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    level: text({ enum: ['view', 'download'] }).notNull(),
    expiresAt: text().notNull(),
    termsAcceptedAt: text(),
    /** SPDX identifier of the licence that was accepted then. */
    termsLicence: text(),
    version: integer().notNull().default(1),
    grantedBy: text()
      .notNull()
      .references(() => accounts.id),
    createdAt: text().notNull(),
    revokedAt: text(),
  },
  (t) => [index('grant_account').on(t.accountId), index('grant_folio').on(t.folioId)],
);

/** A folio frozen under a number. */
export const editions = sqliteTable(
  'edition',
  {
    id: text().primaryKey(),
    folioId: text()
      .notNull()
      .references(() => folios.id),
    number: integer().notNull(),
    frozenAt: text().notNull(),
    frozenBy: text()
      .notNull()
      .references(() => accounts.id),
    content: text({ mode: 'json' }).$type<Record<string, unknown>>().notNull(),
  },
  (t) => [uniqueIndex('edition_number').on(t.folioId, t.number)],
);

/** A folio or a selection as a file to download. */
export const bundles = sqliteTable(
  'bundle',
  {
    id: text().primaryKey(),
    requestedBy: text()
      .notNull()
      .references(() => accounts.id),
    folioId: text().references(() => folios.id),
    /** Accessions, where no folio was named. */
    complexes: text({ mode: 'json' }).$type<string[]>(),
    state: text({ enum: ['queued', 'running', 'ready', 'failed', 'cancelled'] }).notNull(),
    /** 0 … 1 */
    progress: real().notNull().default(0),
    size: integer(),
    sha256: text(),
    storeKey: text(),
    error: text(),
    createdAt: text().notNull(),
    finishedAt: text(),
  },
  (t) => [index('bundle_account').on(t.requestedBy)],
);
