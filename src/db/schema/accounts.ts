import { sql } from 'drizzle-orm';
import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';

// Every `…At` is an ISO 8601 instant in UTC; it sorts as text.

export const accounts = sqliteTable(
  'account',
  {
    id: text().primaryKey(),
    /** Lower case, as given otherwise. */
    email: text().notNull(),
    name: text().notNull(),
    /** Argon2id, or null for an account that only signs in by other means. */
    passwordHash: text(),
    steward: integer({ mode: 'boolean' }).notNull().default(false),
    state: text({ enum: ['active', 'deactivated'] })
      .notNull()
      .default('active'),
    deactivatedAt: text(),
    version: integer().notNull().default(1),
    createdAt: text().notNull(),
  },
  (t) => [uniqueIndex('account_email').on(t.email)],
);

export const labs = sqliteTable(
  'lab',
  {
    id: text().primaryKey(),
    name: text().notNull(),
    place: text(),
    description: text(),
    /** Whether contributors of other labs may attest what this lab measured. */
    outsideAttest: integer({ mode: 'boolean' }).notNull().default(false),
    /** Measures what other labs made, as a spectroscopy service does. */
    facility: integer({ mode: 'boolean' }).notNull().default(false),
    version: integer().notNull().default(1),
    createdAt: text().notNull(),
  },
  (t) => [uniqueIndex('lab_name').on(t.name)],
);

export const memberships = sqliteTable(
  'membership',
  {
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    labId: text()
      .notNull()
      .references(() => labs.id),
    role: text({ enum: ['lead', 'contributor'] }).notNull(),
    createdAt: text().notNull(),
  },
  (t) => [primaryKey({ columns: [t.accountId, t.labId] }), index('membership_lab').on(t.labId)],
);

/** One address asked to join a lab (labId, role) or to read a folio (folioId, level). */
export const invitations = sqliteTable(
  'invitation',
  {
    id: text().primaryKey(),
    email: text().notNull(),
    /** SHA-256 of the token in the link; the token itself is only in the mail. */
    tokenHash: text().notNull(),
    labId: text().references(() => labs.id),
    role: text({ enum: ['lead', 'contributor'] }),
    folioId: text(),
    level: text({ enum: ['view', 'download'] }),
    /** When the access that acceptance gives will end. */
    grantExpiresAt: text(),
    invitedBy: text()
      .notNull()
      .references(() => accounts.id),
    createdAt: text().notNull(),
    /** When the link itself stops working. */
    expiresAt: text().notNull(),
    acceptedAt: text(),
    acceptedBy: text().references(() => accounts.id),
    revokedAt: text(),
    /** How often its mail was sent; each sending makes a new link and ends the one before. */
    sends: integer().notNull().default(1),
    sentAt: text(),
  },
  (t) => [uniqueIndex('invitation_token').on(t.tokenHash), index('invitation_email').on(t.email)],
);

export const accessTokens = sqliteTable(
  'access_token',
  {
    id: text().primaryKey(),
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    name: text().notNull(),
    /** SHA-256 of the token: it has 256 random bits, so that a plain hash keeps it. */
    hash: text().notNull(),
    scopes: text({ mode: 'json' }).$type<('read' | 'write')[]>().notNull(),
    labId: text().references(() => labs.id),
    createdAt: text().notNull(),
    expiresAt: text().notNull(),
    lastUsedAt: text(),
    revokedAt: text(),
  },
  (t) => [uniqueIndex('access_token_hash').on(t.hash), index('access_token_account').on(t.accountId)],
);

/** Counters of attempts within a window, shared by every process on the database. */
export const limits = sqliteTable('rate_limit', {
  key: text().primaryKey(),
  count: integer().notNull(),
  /** End of the window, milliseconds since 1970. */
  until: integer().notNull(),
});

/** Answers kept for a repeated POST with the same Idempotency-Key. */
export const idempotency = sqliteTable('idempotency', {
  /** SHA-256 over account, token, route and key. */
  key: text().primaryKey(),
  bodyHash: text().notNull(),
  /** Null while the first request still runs. */
  status: integer(),
  headers: text({ mode: 'json' }).$type<Record<string, string>>(),
  body: text(),
  createdAt: text().notNull().default(sql`(strftime('%Y-%m-%dT%H:%M:%fZ'))`),
});

/** Facts of this registry that are made once, such as the key of its accession numbers. */
export const registrySettings = sqliteTable('registry_setting', {
  key: text().primaryKey(),
  value: text().notNull(),
});
