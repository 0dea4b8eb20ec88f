import { Readable } from 'node:stream';
import type { ReadableStream as WebStream } from 'node:stream/web';
import Papa from 'papaparse';
import { guardCell } from '#src/chem/spectra/index.ts';
import type { TrailFilter, TrailRow } from '#src/contracts/oversight.ts';
import type { trail } from '#src/db/schema/index.ts';
import type { TrailReading } from '../access/oversight.ts';
import { noteAccess } from '../access-log.ts';
import { database } from '../database.ts';
import { attachment } from '../spectra/download.ts';
import { trailRows } from './list-trail.ts';

type Stored = typeof trail.$inferSelect;

const COLUMNS: Record<string, (row: TrailRow, stored: Stored) => string | number | null> = {
  number: ({ seq }) => seq,
  'time (UTC)': ({ at }) => at,
  person: ({ actor }) => actor?.name ?? 'the program',
  address: ({ actor }) => actor?.email ?? null,
  'access token': ({ token }) => token?.name ?? null,
  action: ({ action }) => action,
  'kind of record': ({ subject }) => subject.type,
  record: ({ subject }) => subject.label,
  'id of record': ({ subject }) => subject.id,
  detail: ({ detail }) => JSON.stringify(detail),
  'hash before': (_, { previousHash }) => previousHash,
  hash: ({ hash }) => hash,
};

/**
 * Lines of CSV (RFC 4180): texts in quotation marks, with an apostrophe before what a spreadsheet would run as a
 * formula; numbers stay numbers.
 */
const csvLines = (rows: (string | number | null)[][]): string =>
  `${Papa.unparse(
    rows.map((row) => row.map((cell) => (typeof cell === 'string' ? guardCell(cell) : (cell ?? '')))),
    { quotes: (cell: unknown) => typeof cell === 'string', newline: '\r\n' },
  )}\r\n`;

function file(chunks: AsyncIterable<string>, type: string, name: string): Response {
  const body = Readable.toWeb(Readable.from(chunks, { objectMode: true }).map((text: string) => Buffer.from(text)));
  return new Response(body as WebStream<Uint8Array> as ReadableStream<Uint8Array>, {
    headers: {
      'content-type': type,
      'content-disposition': attachment(name),
      'x-content-type-options': 'nosniff',
      'cache-control': 'private, no-store',
    },
  });
}

const fileName = (ending: string) => `trail-${new Date().toISOString().slice(0, 10)}.${ending}`;
const note = ({ asker }: TrailReading) =>
  noteAccess(asker, { kind: 'download', subjectType: 'table', subjectId: 'trail' });

/** What fits a filter as CSV, oldest first, for people; sent chunk by chunk. */
export async function trailCsv(access: TrailReading, filter: TrailFilter): Promise<Response> {
  const { db } = await database();
  note(access);
  async function* lines() {
    // The byte order mark tells a spreadsheet that the file is UTF-8.
    yield `\uFEFF${csvLines([Object.keys(COLUMNS)])}`;
    for await (const chunk of trailRows(db, filter))
      yield csvLines(chunk.map(({ shown, stored }) => Object.values(COLUMNS).map((of) => of(shown, stored))));
  }
  return file(lines(), 'text/csv; charset=utf-8', fileName('csv'));
}

/** The same as JSON lines, each row as it is stored, so that the chain can be followed elsewhere. */
export async function trailLines(access: TrailReading, filter: TrailFilter): Promise<Response> {
  const { db } = await database();
  note(access);
  async function* lines() {
    for await (const chunk of trailRows(db, filter))
      yield chunk.map(({ stored }) => `${JSON.stringify(stored)}\n`).join('');
  }
  return file(lines(), 'application/jsonl', fileName('jsonl'));
}
