import type * as schema from '@eremite/schema';
import type { PgDatabase, PgQueryResultHKT } from 'drizzle-orm/pg-core';

/** The database or an open transaction of it, on either driver. */
export type Database = PgDatabase<PgQueryResultHKT, typeof schema>;

/** Injection token of the {@link Database}. */
export const DATABASE = Symbol('DATABASE');

/** Rows of a raw `db.execute`, which both drivers hand over alike though the types do not say so. */
export function rowsOf<T extends object>(result: unknown): T[] {
  return (result as { rows: T[] }).rows;
}
