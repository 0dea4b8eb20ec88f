import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, readdirSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { hostname, tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { isLocked, lockDataFolder } from '../../../scripts/lib/data-lock.ts';

let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'zaffre-lock-'));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

const put = (holder: object | string) =>
  writeFileSync(join(folder, 'lock'), typeof holder === 'string' ? holder : JSON.stringify(holder));

test('a folder is kept for one process and given free without a rest', () => {
  const unlock = lockDataFolder(folder);
  expect(isLocked(folder)).toBe(true);
  expect(() => lockDataFolder(folder)).toThrow(`is in use by process ${process.pid}`);
  unlock();
  expect(isLocked(folder)).toBe(false);
  expect(readdirSync(folder)).toEqual([]);
});

test('a live process of another kind keeps it too', async () => {
  const other = spawn(process.execPath, ['-e', 'setInterval(() => {}, 1000)']);
  await once(other, 'spawn');
  put({ pid: other.pid, host: hostname(), started: null });
  expect(() => lockDataFolder(folder)).toThrow(`is in use by process ${other.pid}`);
  other.kill('SIGKILL');
  await once(other, 'exit');
  lockDataFolder(folder)();
});

test('a number that was given to another process since is no holder', () => {
  put({ pid: process.pid, host: hostname(), started: '1' });
  lockDataFolder(folder)();
});

test.each(['', '{"pid"', 'null', '{"pid":-1}'])('what is no lock (%j) is taken over', (content) => {
  put(content);
  lockDataFolder(folder)();
});

test('a process on another machine holds it as long as it gives signs of life', () => {
  put({ pid: 1, host: 'elsewhere.example', started: null });
  expect(() => lockDataFolder(folder)).toThrow('in use');
  const long = new Date(Date.now() - 120_000);
  utimesSync(join(folder, 'lock'), long, long);
  lockDataFolder(folder)();
});
