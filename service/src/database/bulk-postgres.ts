import { pipeline } from 'node:stream/promises';
import type { Pool } from 'pg';
import { from as copyFrom, to as copyTo } from 'pg-copy-streams';
import { BulkStore, type BulkColumn, type BulkType, type CopyPiece } from './bulk.ts';
import { copyPieces } from './copy-pieces.ts';
import { copyFromSql, copyToSql } from './bulk-sql.ts';
import { CopyDecoder } from './copy-decoder.ts';
import { withLiterals } from './sql-literal.ts';

/** Bulk rows through PostgreSQL's copy streams. */
export class PostgresBulkStore extends BulkStore {
  constructor(private readonly pool: Pool) {
    super();
  }

  override copyInto(
    table: string,
    columns: readonly BulkColumn[],
    rows: AsyncIterable<readonly unknown[][]> | Iterable<readonly unknown[][]>,
  ): Promise<number> {
    return this.copyPieces(table, columns, copyPieces(columns, rows));
  }

  override async copyPieces(
    table: string,
    columns: readonly BulkColumn[],
    pieces: AsyncIterable<CopyPiece>,
  ): Promise<number> {
    const sql = copyFromSql(table, columns, 'stdin');
    let sent = 0;
    for await (const { rows, bytes } of pieces) {
      const client = await this.pool.connect();
      try {
        await pipeline([bytes], client.query(copyFrom(sql)));
        client.release();
      } catch (error) {
        client.release(true);
        throw error;
      }
      sent += rows;
    }
    return sent;
  }

  override async *read(
    select: string,
    params: readonly (string | number | readonly (string | number)[])[],
    types: readonly BulkType[],
  ): AsyncIterable<unknown[][]> {
    const client = await this.pool.connect();
    let whole = false;
    try {
      const decoder = new CopyDecoder(types);
      const stream = client.query(copyTo(copyToSql(withLiterals(select, params), 'stdout')));
      for await (const piece of stream as AsyncIterable<Uint8Array>) {
        const rows = decoder.push(piece);
        if (rows.length > 0) yield rows;
      }
      whole = true;
    } finally {
      // A connection left in the middle of a copy is of no use to anyone.
      client.release(!whole);
    }
  }
}
