import { and, desc, eq, inArray, lte, sql } from 'drizzle-orm';
import { normaliseAccession } from '#src/contracts/accession.ts';
import type { AskedForMore } from '#src/contracts/grants.ts';
import { accessLog, complexes, folioItems, type folios, labs, spectra, trail } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { type EndedAccess, endedAccess, isLongAgo } from '../access/grants.ts';
import { database } from '../database.ts';
import { contactOf } from '../grants/contact.ts';
import { openRequests } from '../grants/requests.ts';

/** What somebody is told who once read a folio: what they knew of it, when it ended, and who can renew it. */
export interface EndedFolio {
  id: string;
  name: string;
  lab: string;
  endedAt: string;
  /** Name of a lead of the lab, or null while nobody leads it. */
  contact: string | null;
  /** Whether they may still ask for it here. */
  mayAsk: boolean;
  /** Their own requests that wait for an answer. */
  asked: AskedForMore[];
}

/** Folios that the asker read until lately, the last ended first. */
export async function endedFolios(asker: Asker): Promise<EndedFolio[]> {
  const ended = (await endedAccess(asker)).filter(({ endedAt }) => !isLongAgo(endedAt));
  ended.sort((a, b) => (a.endedAt < b.endedAt ? 1 : -1));
  return Promise.all(ended.map(describe));
}

/**
 * What to tell of a page that is not in sight: that access to it ended, where the asker had it. Null for everybody
 * else, and for what never was.
 *
 * @param path - of the page, such as `/folios/<id>` or `/complexes/ZF000042-X`
 */
export async function endedAt(asker: Asker | null, path: string): Promise<EndedFolio | null> {
  if (!asker) return null;
  const [, kind, id, ...more] = path.split('/');
  if (!id || more.some((part) => part !== '')) return null;
  const folioId = kind === 'folios' ? id : null;
  const all = await endedAccess(asker, folioId ?? undefined);
  if (all.length === 0) return null;
  const [found] = folioId ? all : await holding(asker, all, kind ?? '', id);
  return found ? describe(found) : null;
}

/**
 * Of folios that ended, those that hold a record which the asker opened once. Without having opened it they do not
 * know that it is in there: it may have been put in after their time.
 */
async function holding(asker: Asker, ended: EndedAccess[], kind: string, id: string): Promise<EndedAccess[]> {
  const opened = await openedRecord(kind, id);
  if (!opened) return [];
  const { db } = await database();
  const [look] = await db
    .select({ day: accessLog.day })
    .from(accessLog)
    .where(and(eq(accessLog.accountId, asker.accountId), eq(accessLog.subjectId, opened.subjectId)))
    .limit(1);
  if (!look) return [];
  const ids = ended.map(({ folio }) => folio.id);
  const rows = await db
    .select({ folioId: folioItems.folioId })
    .from(folioItems)
    .where(and(eq(folioItems.complexId, opened.complexId), inArray(folioItems.folioId, ids)));
  return ended.filter(({ folio }) => rows.some((row) => row.folioId === folio.id));
}

async function openedRecord(kind: string, id: string): Promise<{ subjectId: string; complexId: string } | null> {
  const { db } = await database();
  if (kind === 'complexes') {
    const accession = normaliseAccession(id) ?? '';
    const [row] = await db.select({ id: complexes.id }).from(complexes).where(eq(complexes.accession, accession));
    return row ? { subjectId: row.id, complexId: row.id } : null;
  }
  if (kind !== 'spectra') return null;
  const [row] = await db.select({ complexId: spectra.complexId }).from(spectra).where(eq(spectra.id, id));
  return row ? { subjectId: id, complexId: row.complexId } : null;
}

async function describe({ asker, folio, endedAt: at }: EndedAccess): Promise<EndedFolio> {
  const { db } = await database();
  const [[lab], contact, name, asked] = await Promise.all([
    db.select({ name: labs.name }).from(labs).where(eq(labs.id, folio.labId)),
    contactOf(db, folio.labId),
    nameAt(folio, at),
    openRequests(asker, [folio.id]),
  ]);
  return {
    id: folio.id,
    name,
    lab: lab!.name,
    endedAt: at,
    contact: contact?.name ?? null,
    mayAsk: !isLongAgo(at),
    asked: asked.map(({ id, wants, createdAt }) => ({ id, wants, createdAt })),
  };
}

/** The name that the folio had when access ended: a later one is none of theirs to learn. */
async function nameAt(folio: typeof folios.$inferSelect, at: string): Promise<string> {
  const { db } = await database();
  const name = sql<string | null>`json_extract(${trail.detail}, '$.name')`;
  const [row] = await db
    .select({ name })
    .from(trail)
    .where(
      and(
        eq(trail.subjectType, 'folio'),
        eq(trail.subjectId, folio.id),
        inArray(trail.action, ['create', 'change']),
        sql`${name} is not null`,
        lte(trail.at, at),
      ),
    )
    .orderBy(desc(trail.seq))
    .limit(1);
  return row?.name ?? folio.name;
}
