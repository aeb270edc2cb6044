import { pipeline } from 'node:stream/promises';
import type { Pool } from 'pg';
import { from as copyFrom, to as copyTo } from 'pg-copy-streams';
import { BulkStore, type BulkColumn, type BulkType } from './bulk.ts';
import { copyFromSql, copyToSql, PIECE_BYTES } from './bulk-sql.ts';
import { CopyDecoder } from './copy-decoder.ts';
import { CopyEncoder } from './copy-encoder.ts';
import { withLiterals } from './sql-literal.ts';

/** Bulk rows through PostgreSQL's copy streams. */
export class PostgresBulkStore extends BulkStore {
  constructor(private readonly pool: Pool) {
    super();
  }

  override async copyInto(
    table: string,
    columns: readonly BulkColumn[],
    rows: AsyncIterable<readonly unknown[][]> | Iterable<readonly unknown[][]>,
  ): Promise<number> {
    const sql = copyFromSql(table, columns, 'stdin');
    let written = 0;
    let encoder = new CopyEncoder(columns);
    const send = async () => {
      const client = await this.pool.connect();
      try {
        await pipeline([encoder.finish()], client.query(copyFrom(sql)));
        client.release();
      } catch (error) {
        client.release(true);
        throw error;
      }
      written += encoder.rows;
      encoder = new CopyEncoder(columns, PIECE_BYTES + (1 << 20));
    };
    for await (const batch of rows) {
      for (const row of batch) {
        encoder.add(row);
        if (encoder.length >= PIECE_BYTES) await send();
      }
    }
    if (encoder.rows > 0) await send();
    return written;
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
