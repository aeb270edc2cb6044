import { BulkStore, type BulkColumn, type BulkType, type CopyPiece } from './bulk.ts';
import { copyPieces } from './copy-pieces.ts';
import { copyFromSql, copyToSql } from './bulk-sql.ts';
import { CopyDecoder } from './copy-decoder.ts';
import type { PgliteProxy } from './pglite-proxy.ts';
import { withLiterals } from './sql-literal.ts';

/** Bulk rows through PGlite's blob device. */
export class PgliteBulkStore extends BulkStore {
  constructor(private readonly client: PgliteProxy) {
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
    const sql = copyFromSql(table, columns, `'/dev/blob'`);
    // The next piece is put together while the database writes the one before.
    let inFlight: Promise<unknown> = Promise.resolve();
    let sent = 0;
    for await (const { rows, bytes } of pieces) {
      await inFlight;
      inFlight = this.client.copyIn(sql, bytes);
      inFlight.catch(() => undefined);
      sent += rows;
    }
    await inFlight;
    return sent;
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
