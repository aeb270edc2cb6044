import { asciiText } from './ascii-text.ts';
import { collectRows } from './collect-rows.ts';
import { formatCell, type OutputColumn, type OutputRow, type OutputRows, type OutputTable } from './output-column.ts';
import { utf8Pieces } from './utf8-pieces.ts';

const LINE = 80;
const MAX_LABEL = 16;
const MAX_DECIMALS = 12;

export interface MrtTable extends OutputTable {
  title: string;
  authors: string;
}

interface Laid {
  column: OutputColumn;
  label: string;
  format: string;
  cells: string[];
  width: number;
  hasNull: boolean;
}

/**
 * Writes a machine-readable table as journals take it (CDS Standards for Astronomical Catalogues): a byte-by-byte
 * description, then rows in fixed places. Blank is null wherever `?` is declared. Text is ASCII. Rows are collected
 * first, since the description tells their widths.
 */
export function writeMrt(columns: OutputColumn[], rows: OutputRows, table: MrtTable): AsyncIterable<Uint8Array> {
  return utf8Pieces(mrtTexts(columns, rows, table));
}

async function* mrtTexts(columns: OutputColumn[], rows: OutputRows, table: MrtTable): AsyncIterable<string> {
  const held = await collectRows(rows);
  const labels = uniqueLabels(columns);
  const laid = columns.map((column, i) => layColumn(column, labels[i]!, held, i));
  yield `${wrap('Title: ', table.title)}${wrap('Authors: ', table.authors)}${wrap('Table: ', table.name)}`;
  yield `${'='.repeat(LINE)}\n`;
  yield `Byte-by-byte Description of file: ${
    asciiText(table.name)
      .trim()
      .replace(/[^\w.-]+/g, '_') || 'table'
  }.txt\n`;
  yield `${'-'.repeat(LINE)}\n`;
  const labelWidth = Math.max(5, ...laid.map(({ label }) => label.length));
  const unitWidth = Math.max(5, ...laid.map(({ column }) => unitOf(column).length));
  yield `   Bytes Format ${'Units'.padEnd(unitWidth)} ${'Label'.padEnd(labelWidth)} Explanations\n${'-'.repeat(LINE)}\n`;
  let byte = 1;
  for (const { column, label, format, width, hasNull } of laid) {
    const last = byte + width - 1;
    const bytes = width === 1 ? String(byte).padStart(8) : `${String(byte).padStart(4)}-${String(last).padStart(3)}`;
    const start = `${bytes.padStart(8)} ${format.padEnd(6)} ${unitOf(column).padEnd(unitWidth)} ${label.padEnd(labelWidth)} `;
    yield wrap(start, `${hasNull ? '? ' : ''}${(column.description ?? column.name).replace(/^[\s?[\]]+/, '')}`);
    byte = last + 2;
  }
  if (table.description !== undefined) yield `${'-'.repeat(LINE)}\n${wrap('Note (1): ', table.description)}`;
  yield `${'-'.repeat(LINE)}\n`;
  for (let row = 0; row < held.length; row++) {
    const cells = laid.map(({ column, cells, width }) => {
      return column.datatype === 'text' ? cells[row]!.padEnd(width) : cells[row]!.padStart(width);
    });
    yield `${cells.join(' ').trimEnd()}\n`;
  }
}

function layColumn(column: OutputColumn, label: string, rows: OutputRow[], index: number): Laid {
  const cells = column.datatype === 'double' ? numberCells(column, rows, index) : plainCells(column, rows, index);
  const width = cells.reduce((widest, cell) => Math.max(widest, cell.length), 1);
  const decimals = cells.reduce((most, cell) => Math.max(most, /\.(\d*)/.exec(cell)?.[1]!.length ?? 0), 0);
  const isExponent = cells.some((cell) => cell.includes('E'));
  const number = isExponent ? `E${width}.${decimals}` : `F${width}.${decimals}`;
  const format = { text: `A${width}`, boolean: `A${width}`, integer: `I${width}`, double: number }[column.datatype];
  return { column, label, format, cells, width, hasNull: cells.includes('') };
}

function plainCells(column: OutputColumn, rows: OutputRow[], index: number): string[] {
  return rows.map((row) => asciiText(formatCell(row[index] ?? null, column)));
}

/** One form for the whole column: fixed point where that loses nothing, else exponents. */
function numberCells(column: OutputColumn, rows: OutputRow[], index: number): string[] {
  const written = plainCells(column, rows, index);
  if (column.decimals !== undefined && written.every((cell) => !/e/i.test(cell))) return written;
  const decimals = Math.max(0, ...written.map((cell) => /\.(\d*)/.exec(cell)?.[1]!.length ?? 0));
  const fits = decimals <= MAX_DECIMALS && written.every((cell) => !/e/i.test(cell));
  return written.map((cell) => {
    if (cell === '') return '';
    return fits ? Number(cell).toFixed(decimals) : Number(cell).toExponential().toUpperCase();
  });
}

function unitOf({ unit }: OutputColumn): string {
  return unit ? asciiText(unit).trim().replace(/\s+/g, '.') : '---';
}

/** Labels have no blanks and 16 characters at most, and differ from each other. */
function uniqueLabels(columns: OutputColumn[]): string[] {
  const taken = new Set<string>();
  return columns.map(({ name }, i) => {
    const bare = asciiText(name).trim().replace(/\s+/g, '_').slice(0, MAX_LABEL) || `column_${i + 1}`;
    let label = bare;
    for (let number = 2; taken.has(label); number++)
      label = `${bare.slice(0, MAX_LABEL - 1 - String(number).length)}_${number}`;
    taken.add(label);
    return label;
  });
}

/** Text after a lead, broken at blanks so that lines keep to 80 characters; later lines are indented. */
function wrap(lead: string, text: string): string {
  const room = Math.max(20, LINE - lead.length);
  const lines: string[] = [];
  for (const word of asciiText(text).split(/\s+/)) {
    const last = lines.at(-1);
    if (last !== undefined && last.length + 1 + word.length <= room) lines[lines.length - 1] = `${last} ${word}`;
    else lines.push(word);
  }
  return lines.map((line, i) => `${(i === 0 ? lead : ' '.repeat(lead.length)) + line}`.trimEnd() + '\n').join('');
}
