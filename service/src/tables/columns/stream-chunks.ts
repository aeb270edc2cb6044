import { type RowChunk, TableError } from '../table.ts';
import type { ChunkBuilder } from './chunk-builder.ts';

/** Fills the builder with rows until it is full or the data end; answers whether there may be more. */
export interface RowFiller {
  fill(builder: ChunkBuilder): Promise<boolean>;
  close(): Promise<void>;
}

/** Rows as chunks. On a fault the rows read so far come first, then the TableError with their number. */
export async function* streamChunks(builder: ChunkBuilder, filler: RowFiller): AsyncIterable<RowChunk> {
  let more = true;
  try {
    while (more) {
      let fault: unknown;
      try {
        more = await filler.fill(builder);
      } catch (error) {
        fault = error;
      }
      if (!builder.isEmpty) yield builder.take();
      if (fault !== undefined) throw withRows(fault, builder.rowsMet);
    }
  } finally {
    await filler.close();
  }
}

function withRows(fault: unknown, rowsRead: number): TableError {
  if (fault instanceof TableError) {
    const { line, column, byte } = fault;
    const place = Object.fromEntries(Object.entries({ line, column, byte }).filter(([, value]) => value !== undefined));
    return new TableError(fault.code, `${fault.message} ${countRows(rowsRead)}`, fault.mend, { ...place, rowsRead });
  }
  const detail = fault instanceof Error ? fault.message : String(fault);
  return new TableError(
    'unreadable',
    `The file could not be read on (${detail}). ${countRows(rowsRead)}`,
    'Try again.',
    {
      rowsRead,
    },
  );
}

function countRows(rows: number): string {
  return rows === 1 ? '1 row was read before that.' : `${rows} rows were read before that.`;
}
