import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { TestProject } from 'vitest/node';

const ROOT = join(import.meta.dirname, '../..');
const CACHE = join(ROOT, 'node_modules/.cache/eremite');

declare module 'vitest' {
  interface ProvidedContext {
    /** Archive of a migrated database that every test application starts from. */
    databaseTemplate: string;
  }
}

/** Builds what worker threads and spawned servers run, and makes the migrated database once. */
export default async function setUp(project: TestProject): Promise<void> {
  const parts = project.name === 'browser' ? ['service', 'app'] : ['service'];
  // A process of its own: the test runner's environment must not get into the build.
  const env = { ...process.env, NODE_ENV: 'production', VITEST: undefined };
  const built = spawnSync(process.execPath, [join(ROOT, 'service/scripts/build.mjs'), ...parts], {
    env: env as NodeJS.ProcessEnv,
    encoding: 'utf8',
  });
  if (built.status !== 0) throw new Error(`the build failed:\n${built.stderr}`);
  project.provide('databaseTemplate', await databaseTemplate());
}

async function databaseTemplate(): Promise<string> {
  const hash = createHash('sha256');
  const migrations = join(ROOT, 'schema/migrations');
  for (const name of readdirSync(migrations)
    .filter((file) => file.endsWith('.sql'))
    .sort()) {
    hash.update(name).update(readFileSync(join(migrations, name)));
  }
  for (const name of ['@electric-sql/pglite', 'pg-boss']) {
    hash.update(readFileSync(join(ROOT, 'node_modules', name, 'package.json')));
  }
  const path = join(CACHE, `database-${hash.digest('hex').slice(0, 16)}.tar`);
  if (existsSync(path)) return path;
  const { openDatabase } = await import('@eremite/service/database/open-database.ts');
  const { JobQueue } = await import('@eremite/service/jobs/job-queue.ts');
  const memory = { databaseUrl: undefined, databaseInMemory: true, databaseTemplate: undefined, dataDir: CACHE };
  const open = await openDatabase(memory);
  try {
    const queue = new JobQueue(open.sql);
    await queue.start();
    await queue.stop();
    mkdirSync(CACHE, { recursive: true });
    const draft = `${path}.${process.pid}`;
    writeFileSync(draft, new Uint8Array(await open.dump!()));
    renameSync(draft, path);
  } finally {
    await open.close();
  }
  return path;
}
