import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { accounts } from './accounts.ts';

// How people prove who they are. Every `…At` is an ISO 8601 instant in UTC; secrets that only need comparing are kept
// as SHA-256, since each has at least 128 random bits.

/** A sign-in that holds until it ends, lapses or is idle too long. The cookie names it; this row decides. */
export const sessions = sqliteTable(
  'session',
  {
    id: text().primaryKey(),
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    /** Whether a second factor was shown when it began. */
    secondFactor: integer({ mode: 'boolean' }).notNull().default(false),
    /** As the browser named itself, cut to 300 characters. */
    userAgent: text(),
    address: text(),
    createdAt: text().notNull(),
    lastSeenAt: text().notNull(),
    expiresAt: text().notNull(),
    endedAt: text(),
  },
  (t) => [index('session_account').on(t.accountId, t.endedAt)],
);

/** A second factor of an account. It counts from `confirmedAt` on. */
export const secondFactors = sqliteTable(
  'second_factor',
  {
    id: text().primaryKey(),
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    kind: text({ enum: ['totp', 'passkey'] }).notNull(),
    name: text().notNull(),
    /** TOTP: the shared secret, enciphered under the registry's own secret. */
    secret: text(),
    /** TOTP: the last time step whose code was taken, so that none is taken twice. */
    lastStep: integer(),
    /** Passkey: credential id and public key, base64url. */
    credentialId: text(),
    publicKey: text(),
    /** Passkey: the authenticator's signature counter. */
    counter: integer(),
    transports: text({ mode: 'json' }).$type<string[]>(),
    createdAt: text().notNull(),
    confirmedAt: text(),
    lastUsedAt: text(),
  },
  (t) => [index('second_factor_account').on(t.accountId), uniqueIndex('second_factor_credential').on(t.credentialId)],
);

/** One-time codes for who lost the second factor. */
export const recoveryCodes = sqliteTable(
  'recovery_code',
  {
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    hash: text().notNull(),
    createdAt: text().notNull(),
    usedAt: text(),
  },
  (t) => [primaryKey({ columns: [t.accountId, t.hash] })],
);

/** What a passkey must sign, made by us and good for one answer. */
export const challenges = sqliteTable(
  'challenge',
  {
    id: text().primaryKey(),
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    purpose: text({ enum: ['register', 'sign-in'] }).notNull(),
    challenge: text().notNull(),
    createdAt: text().notNull(),
    expiresAt: text().notNull(),
  },
  (t) => [index('challenge_account').on(t.accountId, t.purpose)],
);

/** A link by mail to choose a new password. */
export const passwordResets = sqliteTable(
  'password_reset',
  {
    id: text().primaryKey(),
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    tokenHash: text().notNull(),
    createdAt: text().notNull(),
    expiresAt: text().notNull(),
    usedAt: text(),
  },
  (t) => [uniqueIndex('password_reset_token').on(t.tokenHash), index('password_reset_account').on(t.accountId)],
);

/** A new address for an account; it takes effect when the old and the new one have both confirmed it. */
export const addressChanges = sqliteTable(
  'address_change',
  {
    id: text().primaryKey(),
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    newEmail: text().notNull(),
    oldTokenHash: text().notNull(),
    newTokenHash: text().notNull(),
    oldConfirmedAt: text(),
    newConfirmedAt: text(),
    createdAt: text().notNull(),
    expiresAt: text().notNull(),
    doneAt: text(),
    cancelledAt: text(),
  },
  (t) => [
    index('address_change_account').on(t.accountId),
    uniqueIndex('address_change_old').on(t.oldTokenHash),
    uniqueIndex('address_change_new').on(t.newTokenHash),
  ],
);
