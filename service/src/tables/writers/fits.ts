import { asciiText } from './ascii-text.ts';
import { collectRows } from './collect-rows.ts';
import type { OutputCell, OutputColumn, OutputRow, OutputRows, OutputTable } from './output-column.ts';

const BLOCK = 2880;
const CARD = 80;
/** Stored value for a missing whole number. */
const NULL_LONG = -(2n ** 63n);
const CODES = { double: 'D', integer: 'K', boolean: 'L', text: 'A' };
const ROWS_A_PIECE = 1_000;

/**
 * Writes a FITS file with one binary table (FITS 4.0, section 7.3). Text is ASCII, as the standard demands. Rows are
 * collected first, since the header tells their number and the widths of text.
 */
export async function* writeFits(
  columns: OutputColumn[],
  rows: OutputRows,
  table: OutputTable,
): AsyncIterable<Uint8Array> {
  const held = await collectRows(rows);
  const widths = columns.map((column, i) => cellWidth(column, i, held));
  const rowBytes = widths.reduce((sum, width) => sum + width, 0);
  yield block([card('SIMPLE', true), card('BITPIX', 8), card('NAXIS', 0), card('EXTEND', true)]);
  yield block(tableCards(columns, widths, rowBytes, held.length, table));
  for (let from = 0; from < held.length; from += ROWS_A_PIECE) {
    yield encodeRows(columns, widths, rowBytes, held.slice(from, from + ROWS_A_PIECE));
  }
  const over = (rowBytes * held.length) % BLOCK;
  if (over > 0) yield new Uint8Array(BLOCK - over);
}

function cellWidth({ datatype }: OutputColumn, index: number, rows: OutputRow[]): number {
  if (datatype === 'boolean') return 1;
  if (datatype !== 'text') return 8;
  return rows.reduce((width, row) => Math.max(width, textOf(row[index] ?? null).length), 1);
}

function tableCards(
  columns: OutputColumn[],
  widths: number[],
  rowBytes: number,
  rows: number,
  table: OutputTable,
): string[] {
  const cards = [
    card('XTENSION', 'BINTABLE'),
    card('BITPIX', 8),
    card('NAXIS', 2),
    card('NAXIS1', rowBytes),
    card('NAXIS2', rows),
    card('PCOUNT', 0),
    card('GCOUNT', 1),
    card('TFIELDS', columns.length),
    card('EXTNAME', table.name),
  ];
  if (table.frame !== undefined) cards.push(card('RADESYS', table.frame));
  for (const [i, column] of columns.entries()) {
    const n = i + 1;
    cards.push(card(`TTYPE${n}`, column.name));
    cards.push(card(`TFORM${n}`, `${column.datatype === 'text' ? widths[i] : ''}${CODES[column.datatype]}`));
    if (column.unit) cards.push(card(`TUNIT${n}`, column.unit));
    if (column.datatype === 'integer') cards.push(card(`TNULL${n}`, NULL_LONG));
    if (column.ucd) cards.push(card(`TUCD${n}`, column.ucd));
    if (column.description) cards.push(card(`TCOMM${n}`, column.description));
  }
  return cards;
}

function card(keyword: string, value: string | number | bigint | boolean): string {
  const start = `${keyword.padEnd(8)}= `;
  if (typeof value === 'boolean') return `${start}${(value ? 'T' : 'F').padStart(20)}`.padEnd(CARD);
  if (typeof value !== 'string') return `${start}${String(value).padStart(20)}`.padEnd(CARD);
  // A string value has 68 characters between its quotes at most; doubled quotes count twice.
  let text = asciiText(value);
  while (text.replaceAll("'", "''").length > 68) text = text.slice(0, -1);
  return `${start}'${text.replaceAll("'", "''").padEnd(8)}'`.padEnd(CARD);
}

function block(cards: string[]): Uint8Array {
  const text = [...cards, 'END'.padEnd(CARD)].join('');
  return Buffer.from(text.padEnd(Math.ceil(text.length / BLOCK) * BLOCK), 'latin1');
}

function encodeRows(columns: OutputColumn[], widths: number[], rowBytes: number, rows: OutputRow[]): Uint8Array {
  const bytes = Buffer.alloc(rowBytes * rows.length);
  let at = 0;
  for (const row of rows) {
    for (const [i, { datatype }] of columns.entries()) {
      const cell = row[i] ?? null;
      if (datatype === 'double') bytes.writeDoubleBE(finite(cell) ?? NaN, at);
      else if (datatype === 'integer') bytes.writeBigInt64BE(longOf(cell), at);
      else if (datatype === 'boolean') bytes[at] = cell === null ? 0 : cell ? 0x54 : 0x46;
      else bytes.write(textOf(cell), at, 'latin1');
      at += widths[i]!;
    }
  }
  return bytes;
}

function finite(cell: OutputCell): number | undefined {
  return typeof cell === 'number' && Number.isFinite(cell) ? cell : undefined;
}

function longOf(cell: OutputCell): bigint {
  const value = finite(cell);
  return value === undefined ? NULL_LONG : BigInt(Math.round(value));
}

function textOf(cell: OutputCell): string {
  return cell === null ? '' : asciiText(String(cell));
}
