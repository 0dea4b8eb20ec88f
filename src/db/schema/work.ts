import { index, integer, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';

/** Work to be done outside a request. A running job whose lease ran out is taken up again. */
export const jobs = sqliteTable(
  'job',
  {
    id: text().primaryKey(),
    kind: text().notNull(),
    payload: text({ mode: 'json' }).$type<Record<string, unknown>>().notNull(),
    state: text({ enum: ['queued', 'running', 'done', 'failed', 'cancelled'] }).notNull(),
    tries: integer().notNull().default(0),
    /** Milliseconds since 1970. */
    runAt: integer().notNull(),
    leaseUntil: integer(),
    progress: real().notNull().default(0),
    error: text(),
    createdAt: text().notNull(),
    finishedAt: text(),
  },
  (t) => [index('job_due').on(t.state, t.runAt)],
);

/** Mail to be sent, each once: the key is given to the mail service as its idempotency key. */
export const mails = sqliteTable(
  'mail',
  {
    id: text().primaryKey(),
    key: text().notNull(),
    kind: text().notNull(),
    to: text().notNull(),
    subject: text().notNull(),
    text: text().notNull(),
    html: text().notNull(),
    state: text({ enum: ['queued', 'sent', 'failed'] }).notNull(),
    tries: integer().notNull().default(0),
    /** Milliseconds since 1970. */
    nextAt: integer().notNull(),
    error: text(),
    createdAt: text().notNull(),
    sentAt: text(),
  },
  (t) => [uniqueIndex('mail_key').on(t.key), index('mail_due').on(t.state, t.nextAt)],
);

/** Who did what when. Rows are only ever added; each carries the hash of the one before. */
export const trail = sqliteTable(
  'trail',
  {
    seq: integer().primaryKey({ autoIncrement: true }),
    at: text().notNull(),
    /** Account, or null for the program itself. */
    actorId: text(),
    /** Access token that was used, where it was one. */
    tokenId: text(),
    action: text().notNull(),
    subjectType: text().notNull(),
    subjectId: text().notNull(),
    detail: text({ mode: 'json' }).$type<Record<string, unknown>>().notNull(),
    previousHash: text().notNull(),
    hash: text().notNull(),
  },
  (t) => [index('trail_subject').on(t.subjectType, t.subjectId), index('trail_actor').on(t.actorId)],
);
