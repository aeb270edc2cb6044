import { existsSync, rmSync } from 'node:fs';
import { mkdir, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Env } from '../config/env.ts';

const mark = (dataDir: string): string => join(dataDir, 'demo-unfinished');

/** Notes that the demo is being made. No one can use the service until it is done, so all there is, is the demo. */
export async function markDemoBegun({ dataDir, databaseUrl, databaseInMemory }: Env): Promise<void> {
  if (databaseUrl || databaseInMemory) return;
  await mkdir(dataDir, { recursive: true });
  await writeFile(mark(dataDir), 'The demo was not finished; the next start begins anew.\n', { flush: true });
}

export async function markDemoDone({ dataDir }: Env): Promise<void> {
  await rm(mark(dataDir), { force: true });
}

/** Clears away half a demo that a killed process left behind. Call it while holding the lock. */
export function clearUnfinishedDemo(dataDir: string): void {
  if (!existsSync(mark(dataDir))) return;
  rmSync(join(dataDir, 'pglite'), { recursive: true, force: true });
  rmSync(join(dataDir, 'files'), { recursive: true, force: true });
  rmSync(mark(dataDir), { force: true });
}
