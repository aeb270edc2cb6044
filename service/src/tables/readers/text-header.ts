import { isPlainNumber } from '../columns/guess-type.ts';
import { commonWidth } from './choose-delimiter.ts';
import type { Delimiter } from './record-scanner.ts';
import type { ScannedRecord } from './text-records.ts';
import { isUnitWord } from './unit-words.ts';

/** Where names and units of a text table were found. */
export interface TextHeader {
  names: string[];
  units?: string[];
  rowsBefore: number;
}

/** Finds the names and units: in the first rows, else in the comments above them, else columns are numbered. */
export function findHeader(
  records: ScannedRecord[],
  comments: string[],
  delimiter: Delimiter,
  notes: string[],
): TextHeader {
  const first = records[0]!.cells;
  if (!first.some(looksNumeric)) return headerInRows(records, delimiter, notes);
  const { cells: width } = commonWidth(records.map((record) => record.cells));
  const said = numberedComments(comments, width) ?? headerInComments(comments, delimiter, width);
  if (said !== undefined) return said;
  notes.push('The file has no header row; columns are called by their number.');
  return { names: Array.from({ length: width }, (_, i) => `column_${i + 1}`), rowsBefore: 0 };
}

function headerInRows(records: ScannedRecord[], delimiter: Delimiter, notes: string[]): TextHeader {
  const names = records[0]!.cells;
  const second = records[1]?.cells ?? [];
  if (second.length > 0 && second.every((cell) => /^-*$/.test(cell)) && second.some((cell) => cell.length > 1)) {
    return { names, rowsBefore: 2 };
  }
  if (delimiter === '\t' && second.length === names.length && second.every((cell) => /^\d*[SNM]$/i.test(cell))) {
    notes.push('The second row tells column types and is not data.');
    return { names, rowsBefore: 2 };
  }
  if (isUnitsRow(second, records.slice(2))) {
    return { names, units: second.map((unit) => (/^-*$/.test(unit) ? '' : unit)), rowsBefore: 2 };
  }
  return { names, rowsBefore: 1 };
}

/** The last comment with as many words as there are columns; a line of units may follow or be that line. */
function headerInComments(comments: string[], delimiter: Delimiter, width: number): TextHeader | undefined {
  const split = comments.map((comment) => splitComment(comment, delimiter));
  for (let i = split.length - 1; i >= Math.max(0, split.length - 3); i--) {
    const names = split[i]!;
    if (names.length !== width || names.some(looksNumeric)) continue;
    const above = split[i - 1];
    const areUnits = names.some(isUnitWord) && names.every((word) => isUnitWord(word) || /^-*$/.test(word));
    return above?.length === width && areUnits
      ? { names: above, units: names, rowsBefore: 0 }
      : { names, rowsBefore: 0 };
  }
  return undefined;
}

/** One comment a column, "# 3 NAME what it is [unit]", as source-extraction software writes; gaps are vector cells. */
function numberedComments(comments: string[], width: number): TextHeader | undefined {
  const names: string[] = [];
  const units: string[] = [];
  let vector = '';
  let unit = '';
  let element = 0;
  const fillTo = (count: number) => {
    for (; names.length < count; names.push(`${vector}_${++element}`)) units[names.length] = unit;
  };
  for (const comment of comments) {
    const parts = /^\s*(\d{1,4})\s+([A-Za-z_]\S*)(?:\s.*?)?(?:\[([^\]]*)\])?\s*$/.exec(comment);
    const place = Number(parts?.[1]);
    if (parts === null || place <= names.length || place > width || (place > 1 && vector === '')) continue;
    fillTo(place - 1);
    names.push(parts[2]!);
    unit = parts[3] ?? '';
    units[place - 1] = unit;
    vector = parts[2]!;
    element = 0;
  }
  if (names.length === 0 || (names.length < 2 && width > 1)) return undefined;
  fillTo(width);
  return { names, units: names.map((_, i) => units[i] ?? ''), rowsBefore: 0 };
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
