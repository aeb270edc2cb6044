import type { BulkColumn } from './bulk.ts';

const quote = (name: string): string => `"${name.replaceAll('"', '""')}"`;

/** `COPY table (columns) FROM source`, binary. */
export function copyFromSql(table: string, columns: readonly BulkColumn[], source: string): string {
  return `copy ${quote(table)} (${columns.map((c) => quote(c.name)).join(', ')}) from ${source} with (format binary)`;
}

/** `COPY (query) TO target`, binary. */
export function copyToSql(select: string, target: string): string {
  return `copy (${select}) to ${target} with (format binary)`;
}

/** Bytes after which a piece is sent: large enough to be quick, small enough for others to get a turn. */
export const PIECE_BYTES = 6_000_000;
