import { asciiText } from './ascii-text.ts';
import { formatCell, type OutputCell, type OutputColumn, type OutputRows, type OutputTable } from './output-column.ts';
import { RowSpool } from './row-spool.ts';
import { utf8Pieces } from './utf8-pieces.ts';

const LINE = 80;
const MAX_LABEL = 16;
const MAX_DECIMALS = 12;
/** `E+123`. */
const EXPONENT = 5;

export interface MrtTable extends OutputTable {
  title: string;
  authors: string;
}

/**
 * Writes a machine-readable table as journals take it (CDS Standards for Astronomical Catalogues): a byte-by-byte
 * description, then rows in fixed places. Blank is null wherever `?` is declared. Text is ASCII. Rows are spooled
 * first, since the description tells their widths.
 */
export function writeMrt(columns: OutputColumn[], rows: OutputRows, table: MrtTable): AsyncIterable<Uint8Array> {
  return utf8Pieces(mrtTexts(columns, rows, table));
}

async function* mrtTexts(columns: OutputColumn[], rows: OutputRows, table: MrtTable): AsyncIterable<string> {
  const layouts = columns.map((column) => new CellLayout(column));
  const spool = await RowSpool.of(rows, (row) => layouts.forEach((layout, i) => layout.see(row[i] ?? null)));
  try {
    yield head(columns, layouts, table);
    for await (const block of spool.blocks()) {
      const lines = block.map((row) =>
        layouts
          .map((layout, i) => layout.write(row[i] ?? null))
          .join(' ')
          .trimEnd(),
      );
      yield `${lines.join('\n')}\n`;
    }
  } finally {
    await spool.close();
  }
}

function head(columns: OutputColumn[], layouts: readonly CellLayout[], table: MrtTable): string {
  const labels = uniqueLabels(columns);
  const file =
    asciiText(table.name)
      .trim()
      .replace(/[^\w.-]+/g, '_') || 'table';
  const labelWidth = Math.max(5, ...labels.map(({ length }) => length));
  const unitWidth = Math.max(5, ...columns.map((column) => unitOf(column).length));
  const end = layouts.reduce((sum, { width }) => sum + width + 1, 0);
  const digits = Math.max(3, String(end).length);
  const rule = `${'-'.repeat(LINE)}\n`;
  const lines = [
    wrap('Title: ', table.title),
    wrap('Authors: ', table.authors),
    wrap('Table: ', table.name),
    `${'='.repeat(LINE)}\n`,
    `Byte-by-byte Description of file: ${file}.txt\n`,
    rule,
    `${'Bytes'.padStart(2 * digits + 1)} Format ${'Units'.padEnd(unitWidth)} ${'Label'.padEnd(labelWidth)} Explanations\n`,
    rule,
  ];
  let byte = 1;
  for (const [i, column] of columns.entries()) {
    const { width, format, hasNull } = layouts[i]!;
    const last = byte + width - 1;
    const place = width === 1 ? String(byte) : `${byte}-${String(last).padStart(digits)}`;
    const start = `${place.padStart(2 * digits + 1)} ${format.padEnd(6)} ${unitOf(column).padEnd(unitWidth)} ${labels[i]!.padEnd(labelWidth)} `;
    lines.push(wrap(start, `${hasNull ? '? ' : ''}${(column.description ?? column.name).replace(/^[\s?[\]]+/, '')}`));
    byte = last + 2;
  }
  if (table.description !== undefined) lines.push(rule, wrap('Note (1): ', table.description));
  return [...lines, rule].join('');
}

/** The fixed place of one column: measured over all rows, then written. Numbers have one form in the whole column. */
class CellLayout {
  hasNull = false;
  #widest = 1;
  #decimals = 0;
  #whole = 1;
  #exponential = 1;
  #isExponential = false;

  constructor(private readonly column: OutputColumn) {}

  see(cell: OutputCell): void {
    const text = this.#text(cell);
    if (text === '') this.hasNull = true;
    else if (this.column.datatype !== 'double') this.#widest = Math.max(this.#widest, text.length);
    else {
      const point = text.indexOf('.');
      this.#isExponential ||= /e/i.test(text);
      this.#whole = Math.max(this.#whole, point < 0 ? text.length : point);
      this.#decimals = Math.max(this.#decimals, point < 0 ? 0 : text.length - point - 1);
      // No exponential form has more digits than the text; the exponent takes five places at most.
      this.#exponential = Math.max(this.#exponential, text.length + EXPONENT);
    }
  }

  get #isFixed(): boolean {
    return !this.#isExponential && this.#decimals <= MAX_DECIMALS;
  }

  get width(): number {
    if (this.column.datatype !== 'double') return this.#widest;
    if (!this.#isFixed) return this.#exponential;
    return this.#whole + (this.#decimals > 0 ? this.#decimals + 1 : 0);
  }

  get format(): string {
    if (this.column.datatype === 'integer') return `I${this.width}`;
    if (this.column.datatype !== 'double') return `A${this.width}`;
    return this.#isFixed ? `F${this.width}.${this.#decimals}` : `E${this.width}.${Math.max(0, this.#exponential - 6)}`;
  }

  write(cell: OutputCell): string {
    const text = this.#text(cell);
    if (text === '' || this.column.datatype === 'text') return text.padEnd(this.width);
    if (this.column.datatype !== 'double') return text.padStart(this.width);
    return (this.#isFixed ? Number(text).toFixed(this.#decimals) : exponential(text)).padStart(this.width);
  }

  #text(cell: OutputCell): string {
    return asciiText(formatCell(cell, this.column));
  }
}

const exponential = (text: string): string => Number(text).toExponential().toUpperCase();

/** Units as the CDS writes them: a logarithm stands in brackets. */
function unitOf({ unit }: OutputColumn): string {
  if (!unit) return '---';
  return asciiText(unit)
    .trim()
    .replace(/\s+/g, '.')
    .replace(/^log\((.*)\)$/, '[$1]');
}

/** Labels have no blanks and 16 characters at most, and differ from each other. */
function uniqueLabels(columns: OutputColumn[]): string[] {
  const taken = new Set<string>();
  return columns.map(({ name, label: short }, i) => {
    const bare =
      asciiText(short ?? name)
        .trim()
        .replace(/\s+/g, '_')
        .slice(0, MAX_LABEL) || `column_${i + 1}`;
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
