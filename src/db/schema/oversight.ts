import { index, integer, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { accounts } from './accounts.ts';
import { folios } from './folios.ts';

/** Who looked at what and who took files away, one row an account, record and day (UTC). */
export const accessLog = sqliteTable(
  'access_log',
  {
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    kind: text({ enum: ['look', 'download'] }).notNull(),
    subjectType: text({ enum: ['complex', 'spectrum', 'folio', 'bundle', 'table'] }).notNull(),
    /** Id of the record; for a table the name of the list. */
    subjectId: text().notNull(),
    /** YYYY-MM-DD */
    day: text().notNull(),
    count: integer().notNull(),
    firstAt: text().notNull(),
    lastAt: text().notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.accountId, t.kind, t.subjectType, t.subjectId, t.day] }),
    index('access_log_subject').on(t.subjectType, t.subjectId),
    index('access_log_day').on(t.day),
  ],
);

/** A guest asks the lab of a folio for more: downloads, a longer time, or something else in words. */
export const accessRequests = sqliteTable(
  'access_request',
  {
    id: text().primaryKey(),
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    folioId: text()
      .notNull()
      .references(() => folios.id),
    wants: text({ enum: ['download', 'longer', 'other'] }).notNull(),
    message: text(),
    createdAt: text().notNull(),
    settledAt: text(),
    settledBy: text().references(() => accounts.id),
    outcome: text({ enum: ['granted', 'declined'] }),
    answer: text(),
  },
  (t) => [index('access_request_folio').on(t.folioId, t.settledAt), index('access_request_account').on(t.accountId)],
);
