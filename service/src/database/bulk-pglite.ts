import { BulkStore, type BulkColumn, type BulkType } from './bulk.ts';
import { copyFromSql, copyToSql, PIECE_BYTES } from './bulk-sql.ts';
import { CopyDecoder } from './copy-decoder.ts';
import { CopyEncoder } from './copy-encoder.ts';
import type { PgliteProxy } from './pglite-proxy.ts';
import { withLiterals } from './sql-literal.ts';

/** Bulk rows through PGlite's blob device. */
export class PgliteBulkStore extends BulkStore {
  constructor(private readonly client: PgliteProxy) {
    super();
  }

  override async copyInto(
    table: string,
    columns: readonly BulkColumn[],
    rows: AsyncIterable<readonly unknown[][]> | Iterable<readonly unknown[][]>,
  ): Promise<number> {
    const sql = copyFromSql(table, columns, `'/dev/blob'`);
    let written = 0;
    // The next piece is put together while the database writes the one before.
    let inFlight: Promise<unknown> = Promise.resolve();
    let encoder = new CopyEncoder(columns);
    const send = async () => {
      await inFlight;
      written += encoder.rows;
      inFlight = this.client.copyIn(sql, encoder.finish());
      inFlight.catch(() => undefined);
      encoder = new CopyEncoder(columns, PIECE_BYTES + (1 << 20));
    };
    for await (const batch of rows) {
      for (const row of batch) {
        encoder.add(row);
        if (encoder.length >= PIECE_BYTES) await send();
      }
    }
    if (encoder.rows > 0) await send();
    await inFlight;
    return written;
  }

  override async *read(
    select: string,
    params: readonly (string | number | readonly (string | number)[])[],
    types: readonly BulkType[],
  ): AsyncIterable<unknown[][]> {
    const buffer = await this.client.copyOut(copyToSql(withLiterals(select, params), `'/dev/blob'`));
    const decoder = new CopyDecoder(types);
    const rows = decoder.push(new Uint8Array(buffer));
    if (rows.length > 0) yield rows;
  }
}
