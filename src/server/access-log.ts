import { sql } from 'drizzle-orm';
import { accessLog } from '../db/schema/index.ts';
import type { Asker } from './access/asker.ts';
import { database } from './database.ts';
import { nowIso } from './ids.ts';
import { log } from './log.ts';

export interface AccessNote {
  kind: (typeof accessLog.$inferInsert)['kind'];
  subjectType: (typeof accessLog.$inferInsert)['subjectType'];
  /** Id of the record; for a table the name of the list. */
  subjectId: string;
}
type Row = typeof accessLog.$inferInsert;

const FLUSH_MS = 1_000;
/** Notes written in one statement. */
const CHUNK = 200;

let noted = new Map<string, Row>();
let timer: NodeJS.Timeout | undefined;
let writing: Promise<void> = Promise.resolve();

/**
 * Note that somebody looked at one record, or took a file away. Costs no write: notes are kept in memory and written
 * together a second later, one row an account, record and day, so that a crash loses the last second of them.
 */
export function noteAccess(
  { accountId }: Pick<Asker, 'accountId'>,
  { kind, subjectType, subjectId }: AccessNote,
): void {
  const at = nowIso();
  const day = at.slice(0, 10);
  const key = [accountId, kind, subjectType, subjectId, day].join('\n');
  const before = noted.get(key);
  if (before) Object.assign(before, { count: before.count + 1, lastAt: at });
  else noted.set(key, { accountId, kind, subjectType, subjectId, day, count: 1, firstAt: at, lastAt: at });
  timer ??= setTimeout(() => void flushAccessLog(), FLUSH_MS).unref();
}

/** Write what was noted. To be called once more before the database is closed. */
export function flushAccessLog(): Promise<void> {
  clearTimeout(timer);
  timer = undefined;
  writing = writing.then(writeNotes);
  return writing;
}

async function writeNotes(): Promise<void> {
  const rows = [...noted.values()];
  noted = new Map();
  for (let from = 0; from < rows.length; from += CHUNK) {
    try {
      const { write } = await database();
      await write((tx) =>
        tx
          .insert(accessLog)
          .values(rows.slice(from, from + CHUNK))
          .onConflictDoUpdate({
            target: [accessLog.accountId, accessLog.kind, accessLog.subjectType, accessLog.subjectId, accessLog.day],
            set: {
              count: sql`${accessLog.count} + excluded.count`,
              lastAt: sql`max(${accessLog.lastAt}, excluded.last_at)`,
            },
          }),
      );
    } catch (error) {
      // Reading goes on although it could not be noted; that much is told.
      log.error({ error: String(error), notes: rows.length - from }, 'who looked could not be noted');
      return;
    }
  }
}
