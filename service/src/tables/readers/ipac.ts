import type { Content } from '../bytes/content.ts';
import { cellText } from '../columns/cell-text.ts';
import { type ColumnFacts, type ColumnType, type OpenTable, type ReaderLimits, TableError } from '../table.ts';
import { uniqueNames } from './column-names.ts';
import { tableName } from './delimited.ts';
import { fixedWidthRows } from './fixed-width-rows.ts';
import { settleLongColumns } from './settle-long-columns.ts';

const TYPE_WORDS: [string, ColumnType][] = [
  ['integer', 'integer'],
  ['long', 'integer'],
  ['double', 'number'],
  ['float', 'number'],
  ['real', 'number'],
  ['char', 'text'],
  ['date', 'text'],
];

interface Head {
  /** Header lines: names, types, units, nulls. */
  bars: string[];
  remarks: string[];
  dataStart: number;
  dataLine: number;
  next: string | undefined;
}

/** Whether a text begins as an IPAC table: names between bars, then types between bars or rows without bars. */
export function isIpac(head: Buffer): boolean {
  const { bars, next } = readHead(head);
  if (bars.length === 0) return false;
  const types = bars[1] === undefined ? [] : split(bars[1]);
  if (types.length > 0) return types.every((word) => columnType(word) !== undefined);
  return next !== undefined && next.trim() !== '' && !next.includes('|');
}

/** Opens an IPAC table (UTF-8). What stands under a bar belongs to no column. */
export async function openIpac(content: Content, limits: ReaderLimits): Promise<OpenTable> {
  const { bars, remarks, dataStart, dataLine } = readHead(content.head);
  const names = bars[0]!;
  const edges = [...names].flatMap((letter, i) => (letter === '|' ? [i] : []));
  if (edges.length - 1 > limits.maxColumns) {
    const message = `The header has ${edges.length - 1} columns, more than the limit of ${limits.maxColumns}.`;
    throw new TableError(
      'too-many-columns',
      message,
      'Keep only the columns that are needed, or have the limit on columns raised.',
      {
        line: dataLine - bars.length,
      },
    );
  }
  const starts = edges.slice(0, -1).map((edge) => edge + 1);
  const ends = edges.slice(1);
  const cell = (line: string | undefined, i: number) => line?.slice(starts[i], ends[i]).trim() ?? '';
  const notes: string[] = [];
  const labels = uniqueNames(
    starts.map((_, i) => cell(names, i).replace(/^-+|-+$/g, '')),
    notes,
  );
  const columns = labels.map((name, i): ColumnFacts => {
    const facts: ColumnFacts = { name, type: columnType(cell(bars[1], i)) ?? 'text' };
    const unit = cell(bars[2], i).replace(/^-+|-+$/g, '');
    const nullMark = cell(bars[3], i);
    if (unit !== '') facts.unit = unit;
    if (nullMark !== '') facts.nullMark = nullMark;
    return facts;
  });
  const rows = () =>
    fixedWidthRows(content, columns, { starts, ends, dataStart, dataLine, ignoreBeyond: true }, limits);
  const description = remarks.join('\n').slice(0, 4000);
  const facts = {
    index: 0,
    name: tableName(content.name),
    ...(description === '' ? {} : { description }),
    columns,
    declaredRows: null,
    notes,
  };
  const longs = columns.flatMap((column, i) => (column.type === 'integer' ? [i] : []));
  await settleLongColumns(facts, longs, rows);
  return { format: 'ipac', tables: [facts], rows };
}

function readHead(head: Buffer): Head {
  const bars: string[] = [];
  const remarks: string[] = [];
  let at = 0;
  let line = 1;
  for (; at < head.length; line++) {
    const found = head.indexOf(10, at);
    const stop = found < 0 ? head.length : found;
    const text = cellText(head, at, stop).trimEnd();
    if (text.startsWith('|') && bars.length < 4) bars.push(text);
    else if (text.startsWith('\\') && bars.length === 0) {
      if (/^\\\s/.test(text)) remarks.push(text.slice(1).trim());
    } else if (bars.length > 0 || text !== '') return { bars, remarks, dataStart: at, dataLine: line, next: text };
    at = stop + 1;
  }
  return { bars, remarks, dataStart: Math.min(at, head.length), dataLine: line, next: undefined };
}

function split(bar: string): string[] {
  return bar
    .split('|')
    .slice(1, -1)
    .map((word) => word.trim());
}

/** Types may be cut to any length, down to one letter. */
function columnType(word: string): ColumnType | undefined {
  const bare = word.toLowerCase().replace(/^-+|-+$/g, '');
  return bare === '' ? undefined : TYPE_WORDS.find(([name]) => name.startsWith(bare))?.[1];
}
