import { formatCell, type OutputColumn, type OutputRows } from './output-column.ts';
import { utf8Pieces } from './utf8-pieces.ts';

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

export interface CsvOptions {
  /** Write the units as a second header row. */
  unitsRow?: boolean;
  /** Lines for `#` comments above the header. */
  comments?: string[];
}

/** Writes CSV (RFC 4180, UTF-8, CR LF). */
export function writeCsv(
  columns: OutputColumn[],
  rows: OutputRows,
  options: CsvOptions = {},
): AsyncIterable<Uint8Array> {
  return utf8Pieces(csvLines(columns, rows, options));
}

async function* csvLines(columns: OutputColumn[], rows: OutputRows, options: CsvOptions): AsyncIterable<string> {
  for (const comment of options.comments ?? []) yield `# ${comment.replace(/[\r\n]+/g, ' ')}\r\n`;
  yield line(columns.map((column) => guardText(column.name)));
  if (options.unitsRow) yield line(columns.map((column) => guardText(column.unit ?? '')));
  for await (const row of rows) {
    yield line(
      columns.map((column, i) => {
        const cell = row[i] ?? null;
        return typeof cell === 'string' ? guardText(cell) : formatCell(cell, column);
      }),
    );
  }
}

function line(cells: string[]): string {
  const text = cells.map(quote).join(',');
  // A lone empty cell would read as an empty line, a leading # as a comment.
  return `${text === '' ? '""' : text}\r\n`;
}

function quote(cell: string): string {
  return /[",\r\n]|^[\s#]|\s$/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell;
}

/**
 * Text that a spreadsheet would run as a formula gets an apostrophe in front; numbers are never touched.
 * @see https://owasp.org/www-community/attacks/CSV_Injection
 */
export function guardText(text: string): string {
  return /^[=+\-@\t\r]/.test(text) && !NUMBER.test(text) ? `'${text}` : text;
}
