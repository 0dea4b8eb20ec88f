import { execFile } from 'node:child_process';
import { copyFileSync } from 'node:fs';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { sql } from 'drizzle-orm';
import Papa from 'papaparse';
import { afterAll, beforeAll, expect, test } from 'vitest';
import type { Page } from '#src/contracts/common.ts';
import type { TrailEntryRecord, TrailRow, TrailVerdict } from '#src/contracts/oversight.ts';
import type { Database } from '#src/db/client.ts';
import { call, json, openRegistry } from './harness.ts';
import { register } from './matrix/fixture.ts';
import { lab, person } from './people.ts';

let registry: Awaited<ReturnType<typeof openRegistry>>;
let database: Database;
let steward: Awaited<ReturnType<typeof person>>;
let ada: Awaited<ReturnType<typeof person>>;
let accession: string;
const as = () => ({ session: steward.id });
const trail = (search = '') => json<Page<TrailRow>>(call('GET', `/api/trail${search}`, as()));
const verify = () => json<TrailVerdict>(call('GET', '/api/trail/verify', as()));

beforeAll(async () => {
  registry = await openRegistry();
  database = await (await import('#src/server/database.ts')).database();
  const north = await lab('North');
  steward = await person('Stella', { steward: true });
  ada = await person('=Ada', { labs: { [north]: 'lead' } });
  accession = await register(ada.token, north, { formula: '[Co(NH3)6]3+', notes: 'first' });
  for (const notes of ['second', 'third'])
    await json(
      call('PATCH', `/api/complexes/${accession}`, { as: ada.token, json: { notes }, headers: { 'if-match': '*' } }),
    );
  await json(call('POST', '/api/labs', { session: steward.id, json: { name: '@SUM(A1)' } }), 201);
});
afterAll(() => registry.close());

test('tells who did what to which record, and by which token', async () => {
  const { items, total } = await trail('?sort=seq');
  expect(total).toBe(items.length);
  expect(items[0]).toMatchObject({
    seq: 1,
    actor: { id: ada.id, name: '=Ada' },
    token: { name: 'test' },
    action: 'register',
    subject: { type: 'complex', label: `${accession} [Co(NH3)6]3+`, href: `/complexes/${accession}` },
  });
  expect(items.at(-1)).toMatchObject({
    actor: { id: steward.id },
    token: null,
    subject: { type: 'lab', label: '@SUM(A1)' },
  });
});

test('is filtered, counted and turned page by page', async () => {
  const changes = await trail('?action=change&facets=1');
  expect(changes.items.map(({ seq }) => seq)).toEqual([3, 2]);
  expect(changes.facets?.action).toEqual(
    expect.arrayContaining([
      { value: 'change', count: 2 },
      { value: 'register', count: 1 },
    ]),
  );
  expect(changes.facets?.subjectType).toEqual([{ value: 'complex', count: 2 }]);
  for (const [search, count] of [
    [`?actor=${ada.id}`, 3],
    ['?actor=program', 0],
    [`?q=${accession}`, 3],
    ['?q=stella', 1],
    ['?q=%25', 0],
    [`?q=${changes.items[0]!.hash}`, 1],
    [`?subject=${changes.items[0]!.subject.id}`, 3],
    ['?from=2999-01-01', 0],
    [`?to=${new Date().toISOString().slice(0, 10)}`, 4],
    ['?subjectType=lab,folio', 1],
  ] as const)
    expect((await trail(search)).total, search).toBe(count);

  const first = await trail('?limit=3');
  const second = await trail(`?limit=3&cursor=${encodeURIComponent(first.next!)}`);
  expect([...first.items, ...second.items].map(({ seq }) => seq)).toEqual([4, 3, 2, 1]);
  expect(second.next).toBeNull();
});

test('a row tells what its fields were before', async () => {
  const entry = await json<TrailEntryRecord>(call('GET', '/api/trail/3', as()));
  expect(entry).toMatchObject({ detail: { notes: 'third' }, before: { notes: 'second' } });
});

test('CSV holds nothing that a spreadsheet would run', async () => {
  const answer = await call('GET', '/api/trail/export.csv', as());
  expect(answer.headers.get('content-disposition')).toMatch(/^attachment; filename="trail-/);
  const { data } = Papa.parse<string[]>((await answer.text()).replace('\uFEFF', ''), { skipEmptyLines: true });
  expect(data).toHaveLength(1 + (await trail()).total);
  expect(data.flat().filter((cell) => /^[=+\-@\t\r]/.test(cell))).toEqual([]);
  expect(data.flat()).toEqual(expect.arrayContaining(["'=Ada", "'@SUM(A1)"]));
});

test('JSON lines hold what the hashes are over', async () => {
  const { trailHash } = await import('#src/server/trail.ts');
  const text = await (await call('GET', '/api/trail/export.jsonl?action=change', as())).text();
  const lines = text.trim().split('\n');
  expect(lines).toHaveLength(2);
  for (const line of lines) {
    const row = JSON.parse(line);
    expect(row.hash).toBe(trailHash(row.previousHash, row));
  }
});

test('the database refuses to change, delete or replace a row', async () => {
  for (const statement of [
    "update trail set action = 'nothing' where seq = 1",
    'delete from trail where seq = 1',
    "insert or replace into trail select seq, at, actor_id, token_id, 'nothing', subject_type, subject_id, detail, previous_hash, hash from trail where seq = 1",
  ])
    await expect(database.client.execute(statement)).rejects.toThrow('append-only');
  expect(await verify()).toMatchObject({ verified: true });
});

test('the chain is followed over several chunks, and its head is that of the last row', async () => {
  const { record } = await import('#src/server/trail.ts');
  await database.write(async (tx) => {
    for (let i = 0; i < 1200; i++)
      await record(tx, { accountId: null }, { action: 'load', subjectType: 'registry', subjectId: String(i) });
  });
  const last = (await trail('?limit=1')).items[0]!;
  expect(await verify()).toEqual({ rows: last.seq, verified: true, firstBroken: null, head: last.hash });
});

test('rows that are added while the chain is followed break nothing', async () => {
  const { record } = await import('#src/server/trail.ts');
  const entry = { action: 'load', subjectType: 'registry' as const, subjectId: 'meanwhile' };
  const adding = async () => {
    for (let i = 0; i < 40; i++) await database.write((tx) => record(tx, { accountId: null }, entry));
  };
  const [, ...verdicts] = await Promise.all([adding(), ...Array.from({ length: 5 }, () => verify())]);
  expect(verdicts.map(({ firstBroken }) => firstBroken)).toEqual([null, null, null, null, null]);
});

/** The file as somebody with a copy of it would change it, who has first taken the triggers away. */
async function tampered(statement: string): Promise<{ verdict: TrailVerdict; folder: string }> {
  const { mkdtempSync } = await import('node:fs');
  const { openDatabase } = await import('#src/db/client.ts');
  const { verifyTrail } = await import('#src/server/oversight/verify-trail.ts');
  const folder = mkdtempSync(join(registry.folder, 'copy-'));
  const path = join(folder, 'zaffre.db');
  await database.client.execute('pragma wal_checkpoint(truncate)');
  copyFileSync(join(registry.folder, 'zaffre.db'), path);
  const copy = await openDatabase(`file:${path}`);
  for (const name of ['trail_no_update', 'trail_no_delete', 'trail_no_replace'])
    await copy.db.run(sql.raw(`drop trigger ${name}`));
  await copy.db.run(sql.raw(statement));
  const verdict = await verifyTrail(copy.db);
  copy.close();
  return { verdict, folder };
}

test.each([
  ['a row whose content was changed', "update trail set actor_id = 'somebody else' where seq = 700", 700],
  ['a row whose time was changed', "update trail set at = '2020-01-01T00:00:00.000Z' where seq = 1", 1],
  ['a row taken out, at the next', 'delete from trail where seq = 3', 4],
  ['rows taken off the end', 'delete from trail where seq > 1000', 1001],
  ['a row put in between by its hash alone', "update trail set hash = 'x' where seq = 5", 5],
])('finds %s', async (_, statement, seq) => {
  const { verdict } = await tampered(statement);
  expect(verdict).toMatchObject({ verified: false, firstBroken: seq });
});

test('the script tells the same and ends with 1 when the chain is broken', async () => {
  const run = promisify(execFile);
  const verifyIn = (folder: string) => {
    const { ZAFFRE_DATA: _, DATABASE_URL: __, ...env } = process.env;
    return run(process.execPath, ['--import', 'tsx', 'scripts/verify-trail.ts', '--data', folder], { env });
  };
  await expect(verifyIn(registry.folder).then(({ stdout }) => JSON.parse(stdout))).resolves.toEqual(await verify());
  const { folder } = await tampered("update trail set action = 'nothing' where seq = 2");
  const failed = await verifyIn(folder).catch((error: { code: number; stdout: string }) => error);
  expect(failed).toMatchObject({ code: 1 });
  expect(JSON.parse(failed.stdout)).toMatchObject({ verified: false, firstBroken: 2 });
});
