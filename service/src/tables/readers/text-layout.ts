import { nulError } from '../bytes/byte-window.ts';
import type { Content } from '../bytes/content.ts';
import { cellText } from '../columns/cell-text.ts';
import { guessColumnType } from '../columns/guess-type.ts';
import { isMissingWord } from '../columns/missing-marks.ts';
import { type ColumnFacts, type ReaderLimits, TableError } from '../table.ts';
import { chooseDelimiter, commonWidth } from './choose-delimiter.ts';
import { uniqueNames } from './column-names.ts';
import type { Delimiter } from './record-scanner.ts';
import { findHeader } from './text-header.ts';
import { lineEnd, type ScannedRecord, scanRecords } from './text-records.ts';
import { sampleFurther } from './sample-further.ts';
import { unitInName } from './unit-words.ts';

/** How a delimited text is laid out, and where its first row of data begins. */
export interface TextLayout {
  delimiter: Delimiter;
  columns: ColumnFacts[];
  decimalComma: boolean;
  dataStart: number;
  dataLine: number;
  comments: string[];
  notes: string[];
  /** 1 when every row begins with a bar, so that its first cell is empty and no column. */
  skip: 0 | 1;
}

/** Works out delimiter, header, units and column types from the head of a UTF-8 text and some samples further on. */
export async function sniffLayout(content: Content, limits: ReaderLimits): Promise<TextLayout> {
  const { comments, start, line } = leadingComments(content);
  const body = wholeLines(content, start, line);
  if (cellText(body).trim() === '') {
    throw new TableError('empty', 'The file holds no row.', 'Export the table again.', { line, byte: start });
  }
  const delimiter = chooseDelimiter(cellText(body));
  if (delimiter === undefined) {
    throw new TableError(
      'not-a-table',
      `No separator splits the lines into the same number of cells (looked from line ${line} on).`,
      'Save the table as CSV with one header row.',
      { line, byte: start },
    );
  }
  const records = scanRecords(content.head, start, start + body.length, line, delimiter, limits);
  if (records.length === 0) {
    throw new TableError('empty', 'The file holds comments but no row.', 'Export the table again.', { line });
  }
  const notes: string[] = [];
  const header = findHeader(records, comments, delimiter, notes);
  const rows = records.slice(header.rowsBefore);
  const skip = delimiter === '|' && records.every((record) => record.cells[0] === '') ? 1 : 0;
  const names = widen(header.names, rows, notes).slice(skip);
  if (names.length > limits.maxColumns) {
    throw new TableError(
      'too-many-columns',
      `Line ${line} has ${names.length} columns, more than the limit of ${limits.maxColumns}.`,
      'Keep only the columns that are needed, or have the limit on columns raised.',
      { line, column: limits.maxColumns + 1 },
    );
  }
  const further = await sampleFurther(content, delimiter, limits, names.length + skip);
  const full = rows.map((row) => row.cells).filter((cells) => cells.length >= names.length + skip);
  const sample = (full.length > 0 ? full : rows.map((row) => row.cells)).concat(further);
  const decimalComma = delimiter !== ',' && usesDecimalComma(sample);
  if (decimalComma) notes.push('Numbers are read with the comma as decimal sign.');
  const columns = uniqueNames(names, notes).map((name, index): ColumnFacts => {
    const unit = header.units?.[index + skip] ?? unitInName(name);
    const type = guessColumnType(
      sample.map((cells) => cells[index + skip] ?? ''),
      decimalComma,
    );
    return unit === undefined || unit === '' ? { name, type } : { name, type, unit };
  });
  const first = rows[0];
  return {
    delimiter,
    columns,
    decimalComma,
    dataStart: first?.start ?? start + body.length,
    dataLine: first?.line ?? records.at(-1)!.line + 1,
    comments,
    notes,
    skip,
  };
}

/** Comment and empty lines before the first record. */
function leadingComments({ head }: Content): { comments: string[]; start: number; line: number } {
  const comments: string[] = [];
  let start = 0;
  let line = 1;
  while (start < head.length) {
    const end = lineEnd(head, start);
    const text = cellText(head, start, end).trim();
    if (text !== '' && !text.startsWith('#')) break;
    if (text.startsWith('#')) comments.push(text.replace(/^#+\s?/, ''));
    start = head[end] === 13 && head[end + 1] === 10 ? end + 2 : Math.min(end + 1, head.length);
    line++;
  }
  return { comments, start, line };
}

/** The lines that are in the head to their end, up to a NUL byte if there is one. */
function wholeLines({ head, complete }: Content, start: number, line: number): Buffer {
  const nul = head.indexOf(0, start);
  if (complete && nul < 0) return head.subarray(start);
  const text = nul < 0 ? head : head.subarray(0, nul);
  const end = Math.max(text.lastIndexOf(10), text.lastIndexOf(13));
  if (end >= start) return text.subarray(start, end + 1);
  if (nul >= 0) throw nulError(nul);
  throw new TableError(
    'line-too-long',
    `Line ${line} is longer than ${head.length - start} bytes, the limit for a header row.`,
    'Check that the file is a table with one row a line.',
    { line, byte: start },
  );
}

/** Rows wider than the header get further names; a comma at the end of every row does not count. */
function widen(names: string[], rows: ScannedRecord[], notes: string[]): string[] {
  const { cells: width } = commonWidth(rows.map((row) => row.cells));
  if (names.length > 1 && names.at(-1) === '' && rows.every((row) => (row.cells[names.length - 1] ?? '') === '')) {
    return names.slice(0, -1);
  }
  const asNamed = rows.filter((row) => row.cells.length === names.length).length;
  const asWide = rows.filter((row) => row.cells.length === width).length;
  if (width <= names.length || asNamed >= asWide) return names;
  const full = rows.filter((row) => row.cells.length === width);
  if (width === names.length + 1 && full.every((row) => row.cells[width - 1] === '')) return names;
  notes.push(`The header names ${names.length} columns, the rows have ${width}; the last ones have no name.`);
  return names.concat(Array.from({ length: width - names.length }, () => ''));
}

function usesDecimalComma(sample: string[][]): boolean {
  let commas = 0;
  let points = 0;
  for (const cells of sample) {
    for (const cell of cells) {
      if (/^[+-]?\d+,\d+([eE][+-]?\d+)?$/.test(cell)) commas++;
      else if (/^[+-]?\d*\.\d+/.test(cell) && !isMissingWord(cell)) points++;
    }
  }
  return commas > points;
}
