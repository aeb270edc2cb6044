import type { ChunkBuilder } from '../columns/chunk-builder.ts';
import { NumberColumn } from '../columns/number-column.ts';
import { TextColumn } from '../columns/text-column.ts';
import type { VotableField } from './votable-head.ts';

type Column = ChunkBuilder['columns'][number];

const BLANKS = new Set([32, 9, 10, 13]);

/** Puts the content of one TD, entities decoded already. */
export function putTableCell(
  column: Column,
  field: VotableField,
  row: number,
  bytes: Buffer,
  from: number,
  to: number,
): void {
  const isText = field.datatype === 'char' || field.datatype === 'unicodeChar';
  let start = from;
  let end = to;
  if (!isText) {
    while (start < end && BLANKS.has(bytes[start]!)) start++;
    while (end > start && BLANKS.has(bytes[end - 1]!)) end--;
  }
  if (start === end) column.putMissing(row);
  else if (isText) column.putCell(row, bytes, start, end);
  else if (column instanceof NumberColumn) column.putCell(row, bytes, start, end);
  else if (field.datatype === 'boolean' && !field.isArray) column.putText(row, booleanText(bytes, start, end));
  else putArray(column, row, bytes.toString('utf8', start, end));
}

function putArray(column: TextColumn, row: number, text: string): void {
  column.putText(row, text.replace(/\s+/g, ' '));
}

function booleanText(bytes: Buffer, start: number, end: number): string {
  const word = bytes.toString('latin1', start, end).toLowerCase();
  if (word === 't' || word === 'true' || word === '1') return 'true';
  if (word === 'f' || word === 'false' || word === '0') return 'false';
  return word === '?' ? '' : word;
}
