import type { BulkColumn } from './bulk.ts';
import { PIECE_BYTES } from './bulk-sql.ts';
import { CopyEncoder } from './copy-encoder.ts';

/**
 * Encodes rows for a binary COPY and sends them in pieces, each whole in itself.
 *
 * @param send takes a piece; the next is put together once its promise resolves, which may be before the piece is written
 * @returns count of rows sent
 */
export async function sendInPieces(
  columns: readonly BulkColumn[],
  rows: AsyncIterable<readonly unknown[][]> | Iterable<readonly unknown[][]>,
  send: (piece: Uint8Array<ArrayBuffer>) => Promise<void>,
): Promise<number> {
  let sent = 0;
  let encoder = new CopyEncoder(columns);
  const flush = async () => {
    sent += encoder.rows;
    await send(encoder.finish());
    encoder = new CopyEncoder(columns, PIECE_BYTES + (1 << 20));
  };
  for await (const batch of rows) {
    for (const row of batch) {
      encoder.add(row);
      if (encoder.length >= PIECE_BYTES) await flush();
    }
  }
  if (encoder.rows > 0) await flush();
  return sent;
}
