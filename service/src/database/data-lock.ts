import { linkSync, mkdirSync, readFileSync, renameSync, rmSync, statSync, utimesSync, writeFileSync } from 'node:fs';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { processMark } from './process-mark.ts';

interface Holder {
  readonly pid: number;
  readonly mark: string;
  readonly host: string;
  readonly since: string;
}

/** The holder touches its lock this often; on another machine only that tells whether it lives. */
const TOUCH_MS = 10_000;
const FOREIGN_STALE_MS = 60_000;

/** Raised when another process holds the data directory. */
export class DataLockError extends Error {
  override readonly name = 'DataLockError';
}

/**
 * Sole use of a data directory: two processes on one built-in database lose rows without a word. A lock whose process
 * is dead is taken over.
 *
 * @returns releases the lock
 * @throws {DataLockError} naming the process that holds it
 */
export function lockData(directory: string): () => void {
  mkdirSync(directory, { recursive: true });
  const path = join(directory, 'lock');
  const mine: Holder = {
    pid: process.pid,
    mark: processMark(process.pid) ?? '',
    host: hostname(),
    since: new Date().toISOString(),
  };
  const text = JSON.stringify(mine);
  const draft = join(directory, `lock.${process.pid}.${Math.random().toString(36).slice(2)}`);
  writeFileSync(draft, text, { flush: true });
  try {
    for (let attempt = 0; !taken(draft, path); attempt += 1) {
      const holder = read(path);
      if (holder && (attempt > 10 || isAlive(holder, path))) throw refusal(directory, holder);
      if (holder) setAside(path, holder, draft);
    }
  } finally {
    rmSync(draft, { force: true });
  }
  const timer = setInterval(() => touch(path), TOUCH_MS);
  timer.unref();
  return () => {
    clearInterval(timer);
    if (readText(path) === text) rmSync(path, { force: true });
  };
}

/** A link is made whole or not at all, so no one ever reads half a lock. */
function taken(draft: string, path: string): boolean {
  try {
    linkSync(draft, path);
    return true;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'EEXIST') return false;
    throw error;
  }
}

function readText(path: string): string | undefined {
  try {
    return readFileSync(path, 'utf8');
  } catch {
    return undefined;
  }
}

function read(path: string): Holder | undefined {
  const text = readText(path);
  if (text === undefined) return undefined;
  try {
    return JSON.parse(text) as Holder;
  } catch {
    return { pid: 0, mark: '', host: hostname(), since: 'unknown' };
  }
}

function isAlive(holder: Holder, path: string): boolean {
  if (holder.host !== hostname()) return Date.now() - statSync(path).mtimeMs < FOREIGN_STALE_MS;
  if (holder.pid <= 0) return false;
  const mark = processMark(holder.pid);
  return mark !== undefined && (mark === '' || holder.mark === '' || mark === holder.mark);
}

/** Removes a dead process's lock, unless a third process was quicker and has put its own there meanwhile. */
function setAside(path: string, dead: Holder, draft: string): void {
  const aside = `${draft}.old`;
  try {
    renameSync(path, aside);
  } catch {
    return;
  }
  const moved = read(aside);
  if (moved && (moved.pid !== dead.pid || moved.since !== dead.since)) taken(aside, path);
  rmSync(aside, { force: true });
}

function touch(path: string): void {
  try {
    utimesSync(path, new Date(), new Date());
  } catch {
    // Only a process on another machine would miss it.
  }
}

function refusal(directory: string, holder: Holder): DataLockError {
  return new DataLockError(
    `The data in ${directory} are in use by process ${holder.pid} on ${holder.host} since ${holder.since}. ` +
      'Stop it first, or give this one a folder of its own with EREMITE_DATA_DIR.',
  );
}
