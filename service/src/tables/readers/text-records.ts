import { cellText } from '../columns/cell-text.ts';
import type { ReaderLimits } from '../table.ts';
import { isComment } from './comment-line.ts';
import { type Delimiter, RecordScanner } from './record-scanner.ts';

const SAMPLE_RECORDS = 1_000;

export interface ScannedRecord {
  cells: string[];
  start: number;
  line: number;
}

/** Splits the first thousand records between two places; empty lines and comments are left out. */
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

/** Index of the line end at or after `start`, or the end of the bytes. */
export function lineEnd(bytes: Uint8Array, start: number): number {
  let end = start;
  while (end < bytes.length && bytes[end] !== 10 && bytes[end] !== 13) end++;
  return end;
}
