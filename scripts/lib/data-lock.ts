import {
  existsSync,
  linkSync,
  mkdirSync,
  readFileSync,
  renameSync,
  rmSync,
  statSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { UsageError } from './options.mjs';

interface Holder {
  pid: number;
  host: string;
  /** When the process started, in the kernel's own count, where it tells: a number is given to another process later. */
  started: string | null;
}

/** How often a holder shows that it lives, and how long it may stay silent, in milliseconds. */
const BEAT_MS = 10_000;
const SILENT_MS = 60_000;

/**
 * Keep a data folder for this process alone. A lock whose process is no more is taken over.
 *
 * @returns a function that gives the folder free again
 * @throws {UsageError} when another process has it
 */
export function lockDataFolder(folder: string): () => void {
  mkdirSync(folder, { recursive: true });
  const lock = join(folder, 'lock');
  const own: Holder = { pid: process.pid, host: hostname(), started: startOf(process.pid) };
  const draft = join(folder, `lock.${process.pid}`);
  writeFileSync(draft, JSON.stringify(own));
  try {
    // A link appears whole or not at all, and only one process can make it.
    for (let attempt = 0; !tryLink(draft, lock); attempt++) {
      const holder = readHolder(lock);
      if (holder && isAlive(holder, lock))
        throw new UsageError(
          `The data folder ${folder} is in use by process ${holder.pid}; stop it, or choose another folder with --data.`,
        );
      if (attempt === 10)
        throw new UsageError(`The data folder ${folder} cannot be locked; remove ${lock} if nothing uses it.`);
      takeAway(lock, holder);
    }
  } finally {
    rmSync(draft, { force: true });
  }
  const beat = setInterval(() => touch(lock), BEAT_MS);
  beat.unref();
  return () => {
    clearInterval(beat);
    if (readHolder(lock)?.pid === process.pid) rmSync(lock, { force: true });
  };
}

/** Whether a process holds the folder now. */
export function isLocked(folder: string): boolean {
  const lock = join(folder, 'lock');
  const holder = readHolder(lock);
  return holder !== null && isAlive(holder, lock);
}

function tryLink(from: string, to: string): boolean {
  try {
    linkSync(from, to);
    return true;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'EEXIST') return false;
    throw error;
  }
}

/** Remove a lock that nobody holds. If another process renewed it in between, it gets its lock back. */
function takeAway(lock: string, stale: Holder | null): void {
  const aside = `${lock}.old.${process.pid}`;
  try {
    renameSync(lock, aside);
  } catch {
    return; // another process was quicker
  }
  const taken = readHolder(aside);
  if (taken && (taken.pid !== stale?.pid || taken.started !== stale.started) && isAlive(taken, aside))
    tryLink(aside, lock);
  rmSync(aside, { force: true });
}

function touch(lock: string): void {
  try {
    utimesSync(lock, new Date(), new Date());
  } catch {
    // the folder was taken away under a running program; its requests will tell
  }
}

function readHolder(lock: string): Holder | null {
  try {
    const holder = JSON.parse(readFileSync(lock, 'utf8')) as Holder;
    return Number.isInteger(holder.pid) && holder.pid > 0 ? holder : null;
  } catch {
    return null;
  }
}

function isAlive({ pid, host, started }: Holder, lock: string): boolean {
  // Of a process in another container or on another machine nothing is known but its last sign of life.
  if (host !== hostname()) return Date.now() - statSync(lock).mtimeMs < SILENT_MS;
  try {
    process.kill(pid, 0);
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
  const now = startOf(pid);
  return started === null || now === null || started === now;
}

/** Start time of a process, where /proc tells it (field 22 of proc_pid_stat(5)). */
function startOf(pid: number): string | null {
  const file = `/proc/${pid}/stat`;
  if (!existsSync(file)) return null;
  const stat = readFileSync(file, 'utf8');
  return stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19] ?? null;
}
