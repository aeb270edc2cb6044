/** A column of a table to be written. */
export interface OutputColumn {
  name: string;
  /** Name in formats that allow 16 characters only; the name, shortened, when absent. */
  label?: string;
  datatype: 'double' | 'integer' | 'text' | 'boolean';
  unit?: string | undefined;
  ucd?: string | undefined;
  description?: string;
  /** Digits after the point; the shortest text that reads back the same when absent. */
  decimals?: number;
  /** Significant digits, for numbers that span decades; `decimals` goes first. */
  significant?: number;
  /** Name of the column whose error this is: layouts made for people put the two together. */
  errorOf?: string;
  /** Name of the column of which this is the limit flag, `<` or `>`. */
  limitFlagOf?: string;
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
export function formatCell(cell: OutputCell, { datatype, decimals, significant }: OutputColumn): string {
  if (cell === null) return '';
  if (typeof cell !== 'number') return String(cell);
  if (!Number.isFinite(cell)) return '';
  if (datatype === 'integer') return String(cell);
  if (decimals !== undefined) return cell.toFixed(decimals);
  return String(significant === undefined ? cell : Number(cell.toPrecision(significant)));
}

/** The very number that {@link formatCell} writes, for formats that store numbers: every format says the same. */
export function roundCell(cell: number, column: OutputColumn): number | null {
  if (!Number.isFinite(cell)) return null;
  return column.datatype === 'integer' ? cell : Number(formatCell(cell, column));
}
