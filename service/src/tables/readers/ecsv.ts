import type { Content } from '../bytes/content.ts';
import { cellText } from '../columns/cell-text.ts';
import { type ColumnFacts, type OpenTable, type ReaderLimits, TableError, type TableFacts } from '../table.ts';
import { uniqueNames } from './column-names.ts';
import { tableName } from './delimited.ts';
import { delimitedRows } from './delimited-rows.ts';
import { type EcsvColumn, readEcsvHead } from './ecsv-head.ts';
import type { Delimiter } from './record-scanner.ts';
import { settleLongColumns } from './settle-long-columns.ts';
import { scanRecords } from './text-records.ts';

/** Whether a text (UTF-8) begins as ECSV. */
export function isEcsv(head: Buffer): boolean {
  return /^# ?%ECSV /.test(head.toString('latin1', 0, 16));
}

/** Opens an ECSV table (UTF-8). */
export async function openEcsv(content: Content, limits: ReaderLimits): Promise<OpenTable> {
  const { lines, start } = headLines(content.head);
  const head = readEcsvHead(lines);
  if (head.columns.length === 0) {
    throw new TableError('bad-header', 'The ECSV head names no columns (datatype).', 'Write the table again.', {
      line: 1,
    });
  }
  if (head.columns.length > limits.maxColumns) {
    const message = `The head names ${head.columns.length} columns, more than the limit of ${limits.maxColumns}.`;
    throw new TableError(
      'too-many-columns',
      message,
      'Keep only the columns that are needed, or have the limit on columns raised.',
      { line: 1 },
    );
  }
  const delimiter = head.delimiter === ' ' ? 'blank' : (head.delimiter as Delimiter);
  if (![',', ';', '\t', '|', 'blank'].includes(delimiter)) {
    throw new TableError('bad-header', `The ECSV delimiter "${delimiter}" is not known.`, 'Use a comma or a space.', {
      line: 1,
    });
  }
  const firstLine = lines.length + 1;
  const [header, first] = scanRecords(content.head, start, content.head.length, firstLine, delimiter, limits);
  if (header === undefined || header.cells.length !== head.columns.length) {
    const found =
      header === undefined ? 'no row of names follows' : `line ${header.line} has ${header.cells.length} names`;
    const message = `The ECSV head describes ${head.columns.length} columns, but ${found}.`;
    throw new TableError('bad-header', message, 'Write the table again.', { line: header?.line ?? firstLine });
  }
  const notes: string[] = [];
  const names = uniqueNames(
    head.columns.map((column, i) => column['name'] ?? header.cells[i]!),
    notes,
  );
  const columns = head.columns.map((column, i) => describe(column, names[i]!));
  const facts: TableFacts = {
    index: 0,
    name: tableName(content.name),
    columns,
    declaredRows: null,
    ...(head.frame === undefined ? {} : { frame: head.frame }),
    notes,
  };
  const dataStart = first?.start ?? content.head.length;
  const layout = {
    delimiter,
    columns,
    decimalComma: false,
    skip: 0 as const,
    dataStart,
    dataLine: first?.line ?? header.line + 1,
    jsonArrays: columns.map((column) => column.arraySize !== undefined),
  };
  const rows = () => delimitedRows(content, layout, limits);
  const longs = head.columns.flatMap(({ datatype }, i) =>
    /64$/.test(datatype ?? '') && columns[i]!.type === 'integer' ? [i] : [],
  );
  await settleLongColumns(facts, longs, rows);
  return { format: 'ecsv', tables: [facts], rows };
}

function describe({ datatype = 'string', subtype, unit, description }: EcsvColumn, name: string): ColumnFacts {
  const type = /^u?int/.test(datatype)
    ? 'integer'
    : /^float/.test(datatype)
      ? 'number'
      : datatype === 'bool'
        ? 'boolean'
        : 'text';
  const facts: ColumnFacts = { name, type };
  const shape = /\[(.*)\]/.exec(subtype ?? '')?.[1];
  if (unit) facts.unit = unit;
  if (description) facts.description = description;
  if (shape)
    facts.arraySize = shape
      .replaceAll('null', '*')
      .split(/\s*,\s*/)
      .reverse()
      .join('x');
  return facts;
}

function headLines(head: Buffer): { lines: string[]; start: number } {
  const lines: string[] = [];
  let start = 0;
  while (head[start] === 35) {
    const found = head.indexOf(10, start);
    const stop = found < 0 ? head.length : found;
    lines.push(
      cellText(head, start + 1, stop)
        .replace(/^ /, '')
        .trimEnd(),
    );
    start = Math.min(head.length, stop + 1);
  }
  return { lines, start };
}
