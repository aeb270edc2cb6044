import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';

function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}

/** One process at a time; the lock of a dead one is taken over. */
export async function withLock(path, work) {
  mkdirSync(dirname(path), { recursive: true });
  for (;;) {
    try {
      writeFileSync(path, String(process.pid), { flag: 'wx' });
      break;
    } catch (error) {
      if (error.code !== 'EEXIST') throw error;
    }
    try {
      const holder = Number(readFileSync(path, 'utf8'));
      if (holder > 0 && !isAlive(holder)) rmSync(path, { force: true });
    } catch {
      // It was released this moment.
    }
    await sleep(100);
  }
  try {
    return await work();
  } finally {
    rmSync(path, { force: true });
  }
}
