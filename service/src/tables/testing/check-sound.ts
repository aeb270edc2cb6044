import { openTable } from '../open-table.ts';
import { memorySource } from '../bytes/byte-source.ts';
import { type OpenTable, type ReaderLimits, type RowChunk, TableError, type TableFormat } from '../table.ts';

/** How an attempt to read some bytes ended: in rows, or in the code of a TableError. */
export type Outcome = { rows: number; code?: string; format?: TableFormat };

/**
 * Opens and reads any bytes and checks what is promised for every input: nothing but a TableError with message and
 * mend is thrown, and all chunks are sound.
 */
export async function checkSound(bytes: Uint8Array, limits: Partial<ReaderLimits> = {}): Promise<Outcome> {
  let rows = 0;
  let open: OpenTable;
  try {
    open = await openTable(memorySource(bytes), limits);
  } catch (error) {
    return { rows, code: codeOf(error) };
  }
  let code: string | undefined;
  for (const { index, columns } of open.tables) {
    if (new Set(columns.map(({ name }) => name)).size !== columns.length) throw new Error('Column names repeat.');
    let next = 1;
    try {
      for await (const chunk of open.rows(index)) {
        checkChunk(chunk, columns.length, next);
        rows += chunk.rows;
        next = chunk.firstRow + chunk.rows + (chunk.broken?.length ?? 0);
      }
    } catch (error) {
      code = codeOf(error);
    }
  }
  return { rows, format: open.format, ...(code === undefined ? {} : { code }) };
}

function codeOf(error: unknown): string {
  if (!(error instanceof TableError)) throw error;
  if (error.code === 'unreadable') throw new Error(`Unclear error: ${error.message}`);
  if (!/^[A-Z"].{10,}\.$/su.test(error.message) || !/^[A-Z].{5,}\.$/su.test(error.mend)) {
    throw new Error(`Unclear error: ${error.message} / ${error.mend}`);
  }
  return error.code;
}

function checkChunk(chunk: RowChunk, width: number, next: number): void {
  if (chunk.columns.length !== width || chunk.firstRow !== next) throw new Error('A chunk does not follow on.');
  for (const data of chunk.columns) {
    if (data.kind === 'number') {
      if (data.values.length !== chunk.rows) throw new Error('A column has not the rows of its chunk.');
      if (data.values.some((value) => Math.abs(value) === Infinity)) throw new Error('An infinity got through.');
      for (const row of data.odd?.keys() ?? []) if (row >= chunk.rows) throw new Error('An odd cell has no row.');
      continue;
    }
    const { offsets, bytes } = data;
    if (offsets.length !== chunk.rows + 1) throw new Error('A column has not the rows of its chunk.');
    for (let i = 0; i < chunk.rows; i++) if (offsets[i]! > offsets[i + 1]!) throw new Error('Text places go back.');
    if (offsets[chunk.rows]! > bytes.length) throw new Error('A text place lies outside its bytes.');
    new TextDecoder('utf-8', { fatal: true }).decode(bytes.subarray(0, offsets[chunk.rows]));
  }
  for (const { row, reason } of chunk.broken ?? []) {
    if (row < chunk.firstRow || reason === '') throw new Error('A broken row is not told.');
  }
}
