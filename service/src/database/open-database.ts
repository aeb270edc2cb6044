import { existsSync, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import * as schema from '@eremite/schema';
import type { PGlite } from '@electric-sql/pglite';
import { drizzle as drizzlePostgres } from 'drizzle-orm/node-postgres';
import { migrate as migratePostgres } from 'drizzle-orm/node-postgres/migrator';
import { drizzle as drizzlePglite } from 'drizzle-orm/pglite';
import { migrate as migratePglite } from 'drizzle-orm/pglite/migrator';
import pg from 'pg';
import type { Env } from '../config/env.ts';
import { BulkStore } from './bulk.ts';
import { PgliteBulkStore } from './bulk-pglite.ts';
import { PostgresBulkStore } from './bulk-postgres.ts';
import type { Database } from './database.ts';
import { lockData } from './data-lock.ts';
import { migrationsFolder } from './migrations-folder.ts';
import { PgliteProxy } from './pglite-proxy.ts';
import type { SqlClient } from './sql-client.ts';
import { clearUnfinishedDemo } from './unfinished-demo.ts';

export interface OpenDatabase {
  readonly db: Database;
  readonly bulk: BulkStore;
  readonly sql: SqlClient;
  /** An archive of the whole database, where it is the built-in one. */
  dump?(): Promise<ArrayBuffer>;
  close(): Promise<void>;
}

type Place = Pick<Env, 'databaseUrl' | 'databaseInMemory' | 'databaseTemplate' | 'dataDir'>;

/** Opens the database that the environment names and brings it up to date. */
export async function openDatabase(place: Place): Promise<OpenDatabase> {
  return place.databaseUrl ? openPostgres(place.databaseUrl) : openPglite(place);
}

async function openPglite(place: Place): Promise<OpenDatabase> {
  const directory = place.databaseInMemory ? undefined : join(place.dataDir, 'pglite');
  const unlock = directory ? lockData(place.dataDir) : () => undefined;
  try {
    if (directory) {
      clearUnfinishedDemo(place.dataDir);
      mkdirSync(directory, { recursive: true });
      await createCluster(directory);
    }
    const client = new PgliteProxy({ directory, template: place.databaseTemplate });
    await client.ready;
    const db = drizzlePglite(client as unknown as PGlite, { schema });
    await migratePglite(db, { migrationsFolder: migrationsFolder() });
    return {
      db,
      bulk: new PgliteBulkStore(client),
      sql: {
        executeSql: async (text, values) =>
          values?.length ? client.query(text, values) : ((await client.exec(text)).at(-1) ?? { rows: [] }),
      },
      dump: () => client.dump(),
      close: () => client.close().finally(unlock),
    };
  } catch (error) {
    unlock();
    throw error;
  }
}

/**
 * Makes the files of a new database in a thread that ends with it: what that takes, half a gigabyte, would otherwise be
 * held as long as the process lives.
 */
async function createCluster(directory: string): Promise<void> {
  if (existsSync(join(directory, 'PG_VERSION'))) return;
  const client = new PgliteProxy({ directory, template: undefined });
  await client.ready;
  await client.close();
}

async function openPostgres(url: string): Promise<OpenDatabase> {
  const pool = new pg.Pool({ connectionString: url, max: 10, application_name: 'eremite' });
  // A connection lost while idle is replaced at the next use; without a listener it would end the process.
  pool.on('error', () => undefined);
  const db = drizzlePostgres(pool, { schema });
  try {
    await migrateAlone(pool);
  } catch (error) {
    await pool.end();
    throw error;
  }
  return {
    db,
    bulk: new PostgresBulkStore(pool),
    sql: { executeSql: async (text, values) => (await pool.query(text, values)) as { rows: never[] } },
    close: () => pool.end(),
  };
}

/** Several processes may start at once; one of them migrates. */
async function migrateAlone(pool: pg.Pool): Promise<void> {
  const client = await pool.connect();
  try {
    await client.query(`select pg_advisory_lock(hashtextextended('eremite:migrate', 0))`);
    try {
      await migratePostgres(drizzlePostgres(client, { schema }), { migrationsFolder: migrationsFolder() });
    } finally {
      await client.query(`select pg_advisory_unlock(hashtextextended('eremite:migrate', 0))`);
    }
  } finally {
    client.release();
  }
}
