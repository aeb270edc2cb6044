import type { ChunkBuilder } from '../columns/chunk-builder.ts';
import { NumberColumn } from '../columns/number-column.ts';
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
  else column.putText(row, arrayText(field, bytes.toString('utf8', start, end)));
}

/** Elements with one blank between; bits and booleans are spelled as they are elsewhere. */
function arrayText({ datatype, nullMark }: VotableField, text: string): string {
  if (datatype === 'bit') return text.replace(/\s+/g, '').split('').join(' ');
  const items = text.split(/\s*,\s*|\s+/);
  if (datatype === 'boolean') return items.map(booleanWord).join(' ');
  return (nullMark === undefined ? items : items.map((item) => (item === nullMark ? 'NaN' : item))).join(' ');
}

function booleanText(bytes: Buffer, start: number, end: number): string {
  return booleanWord(bytes.toString('latin1', start, end));
}

function booleanWord(text: string): string {
  const word = text.toLowerCase();
  if (word === 't' || word === 'true' || word === '1') return 'true';
  if (word === 'f' || word === 'false' || word === '0') return 'false';
  return word === '?' ? '' : word;
}
