import { asciiText } from './ascii-text.ts';
import {
  type OutputCell,
  type OutputColumn,
  type OutputRow,
  type OutputRows,
  type OutputTable,
  roundCell,
} from './output-column.ts';
import { RowSpool } from './row-spool.ts';

const BLOCK = 2880;
const CARD = 80;
/** Stored value for a missing whole number. */
const NULL_LONG = -(2n ** 63n);
const CODES = { double: 'D', integer: 'K', boolean: 'L', text: 'A' };

/**
 * Writes a FITS file with one binary table (FITS 4.0, section 7.3). Text is ASCII, as the standard demands. Rows are
 * spooled first, since the header tells their number and the widths of text.
 */
export async function* writeFits(
  columns: OutputColumn[],
  rows: OutputRows,
  table: OutputTable,
): AsyncIterable<Uint8Array> {
  const widths = columns.map(({ datatype }): number => (datatype === 'boolean' || datatype === 'text' ? 1 : 8));
  const texts = columns.flatMap(({ datatype }, i) => (datatype === 'text' ? [i] : []));
  const spool = await RowSpool.of(rows, (row) => {
    for (const i of texts) widths[i] = Math.max(widths[i]!, textOf(row[i] ?? null).length);
  });
  try {
    const rowBytes = widths.reduce((sum, width) => sum + width, 0);
    yield block([card('SIMPLE', true), card('BITPIX', 8), card('NAXIS', 0), card('EXTEND', true)]);
    yield block(tableCards(columns, widths, rowBytes, spool.count, table));
    for await (const some of spool.blocks()) yield encodeRows(columns, widths, rowBytes, some);
    const over = (rowBytes * spool.count) % BLOCK;
    if (over > 0) yield new Uint8Array(BLOCK - over);
  } finally {
    await spool.close();
  }
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
      if (datatype === 'double') bytes.writeDoubleBE(numberOf(cell, columns[i]!) ?? NaN, at);
      else if (datatype === 'integer') bytes.writeBigInt64BE(longOf(cell), at);
      else if (datatype === 'boolean') bytes[at] = cell === null ? 0 : cell ? 0x54 : 0x46;
      else bytes.write(textOf(cell), at, 'latin1');
      at += widths[i]!;
    }
  }
  return bytes;
}

function numberOf(cell: OutputCell, column: OutputColumn): number | null {
  return typeof cell === 'number' ? roundCell(cell, column) : null;
}

function longOf(cell: OutputCell): bigint {
  return typeof cell === 'number' && Number.isFinite(cell) ? BigInt(Math.round(cell)) : NULL_LONG;
}

function textOf(cell: OutputCell): string {
  return cell === null ? '' : asciiText(String(cell));
}
