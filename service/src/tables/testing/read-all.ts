import { openTable, type OpenOptions } from '../open-table.ts';
import { memorySource } from '../bytes/byte-source.ts';
import { type BrokenRow, type OpenTable, type ReaderLimits, type RowChunk, TableError } from '../table.ts';

/** A cell as tests compare it: null is missing, odd cells are their text. */
export type ReadCell = number | string | null;

export interface ReadTable {
  rows: ReadCell[][];
  rowNumbers: number[];
  lines: number[];
  broken: BrokenRow[];
  /** The error met after the rows, if any. */
  fault: TableError | undefined;
}

/** Reads all rows of one table; whatever is not a TableError is thrown on. */
export async function readAll(open: OpenTable, table = 0): Promise<ReadTable> {
  const read: ReadTable = { rows: [], rowNumbers: [], lines: [], broken: [], fault: undefined };
  try {
    for await (const chunk of open.rows(table)) {
      for (let row = 0; row < chunk.rows; row++) {
        read.rows.push(chunk.columns.map((_, column) => cellAt(chunk, column, row)));
        read.rowNumbers.push(chunk.rowNumbers?.[row] ?? chunk.firstRow + row);
      }
      if (chunk.lines) read.lines.push(...chunk.lines);
      read.broken.push(...(chunk.broken ?? []));
    }
  } catch (error) {
    if (!(error instanceof TableError)) throw error;
    read.fault = error;
  }
  return read;
}

export function cellAt(chunk: RowChunk, column: number, row: number): ReadCell {
  const data = chunk.columns[column]!;
  if (data.kind === 'number') {
    const value = data.values[row]!;
    return data.odd?.get(row) ?? (Number.isNaN(value) ? null : value);
  }
  const bytes = data.bytes.subarray(data.offsets[row]!, data.offsets[row + 1]!);
  return bytes.length === 0 ? null : new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
}

/** Opens text or bytes held in memory. */
export function openMemory(
  content: string | Uint8Array,
  limits: Partial<ReaderLimits> = {},
  options: OpenOptions & { name?: string; pieceBytes?: number } = {},
): Promise<OpenTable> {
  const bytes = typeof content === 'string' ? Buffer.from(content) : content;
  return openTable(memorySource(bytes, options.name, options.pieceBytes), limits, options);
}

/** The TableError that opening or reading the first table ends in. */
export async function faultOf(content: string | Uint8Array, limits: Partial<ReaderLimits> = {}): Promise<TableError> {
  try {
    const { fault } = await readAll(await openMemory(content, limits));
    if (fault) return fault;
  } catch (error) {
    if (error instanceof TableError) return error;
    throw error;
  }
  throw new Error('The table was read without an error.');
}
