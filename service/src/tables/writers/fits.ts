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
    yield block([
      ...cardsOf('SIMPLE', true),
      ...cardsOf('BITPIX', 8),
      ...cardsOf('NAXIS', 0),
      ...cardsOf('EXTEND', true),
    ]);
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
    ...cardsOf('XTENSION', 'BINTABLE'),
    ...cardsOf('BITPIX', 8),
    ...cardsOf('NAXIS', 2),
    ...cardsOf('NAXIS1', rowBytes),
    ...cardsOf('NAXIS2', rows),
    ...cardsOf('PCOUNT', 0),
    ...cardsOf('GCOUNT', 1),
    ...cardsOf('TFIELDS', columns.length),
    ...cardsOf('EXTNAME', table.name),
  ];
  if (table.frame !== undefined) cards.push(...cardsOf('RADESYS', table.frame));
  for (const [i, column] of columns.entries()) {
    const n = i + 1;
    cards.push(...cardsOf(`TTYPE${n}`, column.name));
    cards.push(...cardsOf(`TFORM${n}`, `${column.datatype === 'text' ? widths[i] : ''}${CODES[column.datatype]}`));
    if (column.unit) cards.push(...cardsOf(`TUNIT${n}`, column.unit));
    if (column.datatype === 'integer') cards.push(...cardsOf(`TNULL${n}`, NULL_LONG));
    if (column.ucd) cards.push(...cardsOf(`TUCD${n}`, column.ucd));
    if (column.description) cards.push(...cardsOf(`TCOMM${n}`, column.description));
  }
  return cards;
}

/** Header cards of one keyword: a text too long for one goes on in CONTINUE cards (FITS 4.0, section 4.2.1.2). */
function cardsOf(keyword: string, value: string | number | bigint | boolean): string[] {
  const start = `${keyword.padEnd(8)}= `;
  if (typeof value === 'boolean') return [`${start}${(value ? 'T' : 'F').padStart(20)}`.padEnd(CARD)];
  if (typeof value !== 'string') return [`${start}${String(value).padStart(20)}`.padEnd(CARD)];
  const pieces = splitText(asciiText(value).replaceAll("'", "''"));
  return pieces.map((piece, i) => {
    const text = `${piece}${i < pieces.length - 1 ? '&' : ''}`;
    return `${i === 0 ? start : 'CONTINUE  '}'${text.padEnd(8)}'`.padEnd(CARD);
  });
}

/** Pieces of 67 characters at most, which leaves room for the sign that more follows; a doubled quote stays together. */
function splitText(text: string): string[] {
  const pieces: string[] = [];
  let rest = text;
  while (rest.length > 68) {
    let at = 67;
    while (trailingQuotes(rest.slice(0, at)) % 2 === 1) at--;
    pieces.push(rest.slice(0, at));
    rest = rest.slice(at);
  }
  return [...pieces, rest];
}

const trailingQuotes = (text: string): number => /'*$/.exec(text)![0].length;

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
