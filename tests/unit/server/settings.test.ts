import { mkdtempSync, readFileSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { readSettings, SettingsError } from '#src/server/settings.ts';

let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'zaffre-settings-'));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

const read = (environment: Record<string, string> = {}) => readSettings({ ZAFFRE_DATA: folder, ...environment });
const faults = (environment: Record<string, string>): string[] => {
  try {
    read(environment);
    return [];
  } catch (error) {
    if (error instanceof SettingsError) return error.message.split('\n').map((line) => line.split(':')[0]!);
    throw error;
  }
};
const production = {
  ZAFFRE_MODE: 'production',
  PUBLIC_ORIGIN: 'https://zaffre.example/',
  AUTH_SECRET: 'x'.repeat(32),
  RESEND_API_KEY: 'key',
};
const bucket = { S3_ENDPOINT: 'https://s3.example', S3_BUCKET: 'b', S3_ACCESS_KEY_ID: 'i', S3_SECRET_ACCESS_KEY: 's' };

test('nothing set is a demo on this machine, with file, folder and a secret of its own', () => {
  const first = read();
  expect(first).toMatchObject({
    mode: 'demo',
    host: '127.0.0.1',
    publicOrigin: 'http://localhost:4321',
    databaseUrl: `file:${join(folder, 'zaffre.db')}`,
    s3: null,
    trustProxy: false,
  });
  expect(first.authSecret.length).toBeGreaterThanOrEqual(32);
  expect(read().authSecret).toBe(first.authSecret);
  expect(readFileSync(join(folder, 'secret'), 'utf8')).toBe(first.authSecret);
  expect(statSync(join(folder, 'secret')).mode & 0o077).toBe(0);
});

test('an empty variable is one that is not set', () => {
  expect(read({ PORT: '', DATABASE_URL: '', S3_BUCKET: '' })).toMatchObject({ port: 4321, s3: null });
});

test('the demo is refused where others could reach it', () => {
  expect(faults({ HOST: '0.0.0.0' })).toEqual(['HOST']);
  expect(faults({ PUBLIC_ORIGIN: 'https://zaffre.example' })).toEqual(['PUBLIC_ORIGIN']);
  expect(faults({ HOST: '::1', PUBLIC_ORIGIN: 'http://127.0.0.1:80' })).toEqual([]);
});

test('production names everything that it lacks', () => {
  expect(faults({ ZAFFRE_MODE: 'production' })).toEqual(['PUBLIC_ORIGIN', 'AUTH_SECRET', 'RESEND_API_KEY']);
  expect(read(production)).toMatchObject({ mode: 'production', publicOrigin: 'https://zaffre.example' });
});

test('production is reached by https, or on this machine alone', () => {
  expect(faults({ ...production, PUBLIC_ORIGIN: 'http://zaffre.example' })).toEqual(['PUBLIC_ORIGIN']);
  expect(faults({ ...production, PUBLIC_ORIGIN: 'http://localhost:4321' })).toEqual([]);
});

test('an object store is given whole or not at all', () => {
  expect(read(bucket).s3).toMatchObject({ endpoint: 'https://s3.example', bucket: 'b', region: 'auto' });
  expect(faults({ ...bucket, S3_ACCESS_KEY_ID: '' })).toEqual(['S3_ACCESS_KEY_ID']);
});

test.each([
  [{ PORT: '70000' }, 'PORT'],
  [{ AUTH_SECRET: 'short' }, 'AUTH_SECRET'],
  [{ TRUST_PROXY: 'maybe' }, 'TRUST_PROXY'],
  [{ ACCESSION_PREFIX: 'zf' }, 'ACCESSION_PREFIX'],
  [{ ZAFFRE_MODE: 'trial' }, 'ZAFFRE_MODE'],
])('%j is refused by name', (environment, name) => expect(faults(environment)).toEqual([name]));
