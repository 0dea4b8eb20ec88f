import { mkdtempSync, rmSync } from 'node:fs';
import { readdir } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { type Database, openDatabase } from '#src/db/client.ts';
import { accounts, registrySettings } from '#src/db/schema/index.ts';
import { readSettings, type Settings } from '#src/server/settings.ts';
import { type LoadDemo, prepareDatabase } from '../../../scripts/lib/demo-data.ts';

let settings: Settings;

beforeEach(() => {
  settings = readSettings({ ZAFFRE_DATA: mkdtempSync(join(tmpdir(), 'zaffre-demo-')) });
});
afterEach(() => rmSync(settings.dataFolder, { recursive: true, force: true }));

const person = (id: string) => ({ id, email: `${id}@demo.example`, name: id, createdAt: '2026-12-01T00:00:00.000Z' });
const addPerson = (database: Database, id: string) => database.write((tx) => tx.insert(accounts).values(person(id)));
const load: LoadDemo = async (database, store) => {
  await store.put('originals/demo', Buffer.from('demo'));
  await addPerson(database, 'demo');
};
const loadHalf: LoadDemo = async (database, store) => {
  await store.put('originals/half', Buffer.from('half'));
  await addPerson(database, 'half');
  throw new Error('the power failed');
};
const never: LoadDemo = async () => {
  throw new Error('must not be loaded');
};

async function people(): Promise<string[]> {
  const database = await openDatabase(settings.databaseUrl);
  const rows = await database.db.select({ id: accounts.id }).from(accounts);
  database.close();
  return rows.map(({ id }) => id);
}

test('an empty registry gets the demo data once', async () => {
  expect(await prepareDatabase(settings, true, load)).toBe(true);
  expect(await prepareDatabase(settings, true, never)).toBe(true);
  expect(await people()).toEqual(['demo']);
});

test('without it being asked for, or with people there already, nothing is loaded', async () => {
  expect(await prepareDatabase(settings, false, never)).toBe(false);
  const database = await openDatabase(settings.databaseUrl);
  await addPerson(database, 'steward');
  database.close();
  expect(await prepareDatabase(settings, true, never)).toBe(false);
});

test('a load that broke off is cleared away and made again', async () => {
  await expect(prepareDatabase(settings, true, loadHalf)).rejects.toThrow('the power failed');
  expect(await people()).toEqual(['half']);
  expect(await prepareDatabase(settings, true, load)).toBe(true);
  expect(await people()).toEqual(['demo']);
  expect(await readdir(join(settings.dataFolder, 'store', 'objects', 'originals'))).toEqual(['demo@']);
});

test('a load that broke off in a database elsewhere is left for a person', async () => {
  const elsewhere = { ...settings, databaseUrl: `file:${join(settings.dataFolder, 'other.db')}` };
  await expect(prepareDatabase(elsewhere, true, loadHalf)).rejects.toThrow('the power failed');
  await expect(prepareDatabase(elsewhere, true, load)).rejects.toThrow('empty the database and the object store');
});

test('the mark tells how far it got', async () => {
  await prepareDatabase(settings, true, load);
  const database = await openDatabase(settings.databaseUrl);
  expect(await database.db.select().from(registrySettings)).toContainEqual({ key: 'demo', value: 'loaded' });
  database.close();
});
