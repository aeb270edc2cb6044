/** A column of a table to be written. */
export interface OutputColumn {
  name: string;
  datatype: 'double' | 'integer' | 'text' | 'boolean';
  unit?: string;
  ucd?: string;
  description?: string;
  /** Digits after the point; the shortest text that reads back the same when absent. */
  decimals?: number;
}

/** Null, NaN and infinities are written as the format's missing value. */
export type OutputCell = number | string | boolean | null;
export type OutputRow = readonly OutputCell[];
export type OutputRows = Iterable<OutputRow> | AsyncIterable<OutputRow>;

/** What a table says of itself in formats that have room for it. */
export interface OutputTable {
  name: string;
  description?: string;
  /** Reference frame of the positions, such as ICRS. */
  frame?: string;
}

/** The text of a number or boolean, empty when missing; strings unchanged. */
export function formatCell(cell: OutputCell, column: OutputColumn): string {
  if (cell === null) return '';
  if (typeof cell !== 'number') return String(cell);
  if (!Number.isFinite(cell)) return '';
  return column.decimals === undefined || column.datatype === 'integer' ? String(cell) : cell.toFixed(column.decimals);
}
