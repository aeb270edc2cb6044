import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { hostname, tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { DataLockError, lockData } from '@eremite/service/database/data-lock.ts';
import { startServer } from '../support/start-server.ts';

describe('the lock on the data', () => {
  let folder: string;
  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'eremite-lock-'));
  });
  afterEach(() => rmSync(folder, { recursive: true, force: true }));
  const path = () => join(folder, 'lock');
  const hold = (holder: object) =>
    writeFileSync(
      path(),
      JSON.stringify({ mark: '1', host: hostname(), since: '2020-01-01T00:00:00.000Z', ...holder }),
    );

  it('lets one holder in, refuses a second by name, and is free afterwards', () => {
    const release = lockData(folder);
    expect(() => lockData(folder)).toThrow(DataLockError);
    expect(() => lockData(folder)).toThrow(new RegExp(`process ${process.pid} .*EREMITE_DATA_DIR`));
    release();
    expect(existsSync(path())).toBe(false);
    lockData(folder)();
  });

  it('is taken over from a process that is dead', () => {
    hold({ pid: 2 ** 22 - 7 });
    const release = lockData(folder);
    expect(JSON.parse(readFileSync(path(), 'utf8')).pid).toBe(process.pid);
    release();
  });

  it('is taken over when the process id has gone to another process since', () => {
    hold({ pid: process.pid, mark: '1' });
    lockData(folder)();
  });

  it('is taken over when it cannot be read', () => {
    writeFileSync(path(), '{"pid":');
    lockData(folder)();
  });

  it('is respected when another machine holds it and has touched it lately', () => {
    hold({ pid: 1, host: 'another-machine' });
    expect(() => lockData(folder)).toThrow('another-machine');
  });
});

describe('two servers on one data folder', () => {
  it('are one too many: the second refuses and the first goes on', async () => {
    const first = await startServer({
      env: { EREMITE_ADMIN_EMAIL: 'admin@example.org', EREMITE_ADMIN_PASSWORD: 'a long password' },
    });
    try {
      await expect(startServer({ dataDir: first.dataDir })).rejects.toThrow(/in use by process \d+ .*EREMITE_DATA_DIR/);
      expect((await first.signIn('admin@example.org', 'a long password')).cookie('access')).toBeTruthy();
      expect(await first.stop()).toBe(0);
      expect(existsSync(join(first.dataDir, 'lock'))).toBe(false);
    } finally {
      await first.close();
    }
  });
});
