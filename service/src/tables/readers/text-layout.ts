import type { Content } from '../bytes/content.ts';
import { cellText } from '../columns/cell-text.ts';
import { guessColumnType, isPlainNumber } from '../columns/guess-type.ts';
import { isMissingWord } from '../columns/missing-marks.ts';
import { type ColumnFacts, type ReaderLimits, TableError } from '../table.ts';
import { chooseDelimiter, commonWidth } from './choose-delimiter.ts';
import { isComment } from './comment-line.ts';
import { uniqueNames } from './column-names.ts';
import { type Delimiter, RecordScanner } from './record-scanner.ts';
import { sampleFurther } from './sample-further.ts';
import { isUnitWord, unitInName } from './unit-words.ts';

/** How a delimited text is laid out, and where its first row of data begins. */
export interface TextLayout {
  delimiter: Delimiter;
  columns: ColumnFacts[];
  decimalComma: boolean;
  dataStart: number;
  dataLine: number;
  comments: string[];
  notes: string[];
}

interface ScannedRecord {
  cells: string[];
  start: number;
  line: number;
}

const SAMPLE_RECORDS = 1_000;

/** Works out delimiter, header, units and column types from the head of a UTF-8 text and some samples further on. */
export async function sniffLayout(content: Content, limits: ReaderLimits): Promise<TextLayout> {
  const { comments, start, line } = leadingComments(content);
  const body = wholeLines(content, start, line);
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
  const names = widen(header.names, rows, notes);
  if (names.length > limits.maxColumns) {
    throw new TableError(
      'too-many-columns',
      `Line ${line} has ${names.length} columns, more than the limit of ${limits.maxColumns}.`,
      'Keep only the columns that are needed.',
      { line, column: limits.maxColumns + 1 },
    );
  }
  const further = await sampleFurther(content, delimiter, limits, names.length);
  const sample = rows.map((row) => row.cells).concat(further);
  const decimalComma = delimiter !== ',' && usesDecimalComma(sample);
  if (decimalComma) notes.push('Numbers are read with the comma as decimal sign.');
  const columns = uniqueNames(names, notes).map((name, index): ColumnFacts => {
    const unit = header.units?.[index] ?? unitInName(name);
    const type = guessColumnType(
      sample.map((cells) => cells[index] ?? ''),
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

function lineEnd(bytes: Uint8Array, start: number): number {
  let end = start;
  while (end < bytes.length && bytes[end] !== 10 && bytes[end] !== 13) end++;
  return end;
}

function wholeLines({ head, complete }: Content, start: number, line: number): Buffer {
  if (complete) return head.subarray(start);
  const end = Math.max(head.lastIndexOf(10), head.lastIndexOf(13));
  if (end < start) {
    const message = `Line ${line} is longer than ${head.length - start} bytes; a header row is not.`;
    throw new TableError('line-too-long', message, 'Check that the file is a table with one row a line.', {
      line,
      byte: start,
    });
  }
  return head.subarray(start, end + 1);
}

/** Splits complete records; also used on samples. */
export function scanRecords(
  bytes: Uint8Array,
  from: number,
  end: number,
  firstLine: number,
  delimiter: Delimiter,
  limits: ReaderLimits,
): ScannedRecord[] {
  const scanner = new RecordScanner(delimiter, limits.maxCellLength);
  const records: ScannedRecord[] = [];
  let line = firstLine;
  for (let start = from; start < end && records.length < SAMPLE_RECORDS;) {
    if (isComment(bytes, start, end)) {
      const stop = lineEnd(bytes, start);
      start = bytes[stop] === 13 && bytes[stop + 1] === 10 ? stop + 2 : stop + 1;
      line++;
      continue;
    }
    const next = scanner.scan(bytes, start, end, true);
    const cells = Array.from({ length: scanner.count }, (_, i) => {
      const text = cellText(bytes, scanner.starts[i]!, scanner.ends[i]!);
      return scanner.doubled[i] === 1 ? text.replaceAll('""', '"') : text;
    });
    if (cells.length > 1 || (cells[0] ?? '') !== '') records.push({ cells, start, line });
    line += scanner.newlines;
    start = next;
  }
  return records;
}

interface Header {
  names: string[];
  units?: string[];
  rowsBefore: number;
}

function findHeader(records: ScannedRecord[], comments: string[], delimiter: Delimiter, notes: string[]): Header {
  const first = records[0]!.cells;
  if (!first.some(looksNumeric)) {
    const second = records[1]?.cells;
    if (second !== undefined && isUnitsRow(second, records.slice(2))) {
      return { names: first, units: second.map((unit) => (/^-*$/.test(unit) ? '' : unit)), rowsBefore: 2 };
    }
    if (second !== undefined && delimiter === '\t' && second.every((cell) => /^\d*[SNM]$/i.test(cell))) {
      notes.push('The second row tells column types and is not data.');
      return { names: first, rowsBefore: 2 };
    }
    return { names: first, rowsBefore: 1 };
  }
  const { cells: width } = commonWidth(records.map((record) => record.cells));
  const split = comments.map((comment) => splitComment(comment, delimiter));
  for (let i = split.length - 1; i >= Math.max(0, split.length - 3); i--) {
    const names = split[i]!;
    if (names.length !== width || names.some(looksNumeric)) continue;
    const above = split[i - 1];
    if (
      above?.length === width &&
      names.some(isUnitWord) &&
      names.every((word) => isUnitWord(word) || /^-*$/.test(word))
    ) {
      return { names: above, units: names, rowsBefore: 0 };
    }
    const below = split[i + 1];
    return below?.length === width ? { names, units: below, rowsBefore: 0 } : { names, rowsBefore: 0 };
  }
  notes.push('The file has no header row; columns are called by their number.');
  return { names: Array.from({ length: width }, (_, i) => `column_${i + 1}`), rowsBefore: 0 };
}

function splitComment(comment: string, delimiter: Delimiter): string[] {
  const cells = delimiter === 'blank' ? comment.trim().split(/\s+/) : comment.split(delimiter);
  return cells.map((cell) => cell.trim().replace(/^"(.*)"$/, '$1'));
}

function looksNumeric(cell: string): boolean {
  return (
    isPlainNumber(cell.trim()) || isPlainNumber(cell.trim(), true) || /^[+-]?\d+[: ]\d+[: ][\d.]+$/.test(cell.trim())
  );
}

function isUnitsRow(cells: string[], below: ScannedRecord[]): boolean {
  if (below.length === 0 || cells.some(looksNumeric)) return false;
  const words = cells.filter((cell) => !/^[-\s]*$/.test(cell));
  const units = words.filter(isUnitWord).length;
  const overNumbers = cells.some(
    (cell, i) => isUnitWord(cell) && below.some((record) => looksNumeric(record.cells[i] ?? '')),
  );
  return overNumbers && units >= words.length * 0.5;
}

/** Rows wider than the header get further names; a comma at the end of every row does not count. */
function widen(names: string[], rows: ScannedRecord[], notes: string[]): string[] {
  const { cells: width } = commonWidth(rows.map((row) => row.cells));
  if (names.length > 1 && names.at(-1) === '' && rows.every((row) => (row.cells[names.length - 1] ?? '') === '')) {
    return names.slice(0, -1);
  }
  if (width <= names.length) return names;
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
