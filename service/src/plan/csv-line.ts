import { guardText } from '../tables/writers/csv.ts';

export type Cell = string | number | null;

/** Text of a CSV cell: quoted where it must be, guarded against being run as a formula. */
function textCell(text: string): string {
  const guarded = guardText(text);
  return /[",\r\n]|^[\s#]|\s$/.test(guarded) ? `"${guarded.replaceAll('"', '""')}"` : guarded;
}

/** Nine decimals, or eight significant digits of what is smaller; missing is empty. */
function numberCell(value: number): string {
  if (!Number.isFinite(value)) return '';
  const size = Math.abs(value);
  if (size >= 1e-3 && size < 1e6) return String(Math.round(value * 1e9) / 1e9);
  return Number.isInteger(value) ? String(value) : String(Number(value.toPrecision(8)));
}

/** A line of a CSV file with its end (RFC 4180: CR LF). */
export function csvLine(cells: readonly Cell[]): string {
  let line = '';
  for (let i = 0; i < cells.length; i++) {
    const cell = cells[i]!;
    if (i > 0) line += ',';
    if (typeof cell === 'string') line += textCell(cell);
    else if (cell !== null) line += numberCell(cell);
  }
  return `${line}\r\n`;
}
