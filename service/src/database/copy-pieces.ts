import type { BulkColumn, CopyPiece } from './bulk.ts';
import { PIECE_BYTES } from './bulk-sql.ts';
import { CopyEncoder } from './copy-encoder.ts';

/** Rows as pieces for a binary COPY; the next is put together when it is asked for. */
export async function* copyPieces(
  columns: readonly BulkColumn[],
  rows: AsyncIterable<readonly unknown[][]> | Iterable<readonly unknown[][]>,
): AsyncIterable<CopyPiece> {
  let encoder = new CopyEncoder(columns);
  for await (const batch of rows) {
    for (const row of batch) {
      encoder.add(row);
      if (encoder.length < PIECE_BYTES) continue;
      yield encoder.piece();
      encoder = new CopyEncoder(columns, PIECE_BYTES + (1 << 20));
    }
  }
  if (encoder.rows > 0) yield encoder.piece();
}
