import { type Content, readHead } from '../bytes/content.ts';
import { detectEncoding } from '../bytes/encoding.ts';
import { cellText } from '../columns/cell-text.ts';
import { type OpenTable, type ReaderLimits, TableError, type TableFacts } from '../table.ts';
import { type ByteByByte, hasByteByByte, isRule, readByteByByte } from './byte-by-byte.ts';
import { tableName } from './delimited.ts';
import { type FixedWidthLayout, fixedWidthRows } from './fixed-width-rows.ts';
import { settleLongColumns } from './settle-long-columns.ts';

/** Whether a file begins as a journal's machine-readable table or is a ReadMe with byte-by-byte descriptions. */
export function isMrt(head: Buffer): boolean {
  return hasByteByByte(cellText(head));
}

/** Opens a machine-readable table: description, notes and rows in one file. Column places count bytes. */
export async function openMrt(content: Content, limits: ReaderLimits): Promise<OpenTable> {
  const text = cellText(content.head);
  const lines = text.split('\n');
  const [description, ...others] = readByteByByte(lines);
  let last = lines.length - 1;
  while (last > 0 && !isRule(lines[last]!)) last--;
  const isReadMe = others.length > 0 || /^\(End\)/m.test(lines.slice(last + 1).join('\n'));
  if (description === undefined || isReadMe) {
    const files = [description, ...others].flatMap((one) => one?.files ?? []).join(', ');
    throw new TableError(
      'not-a-table',
      `This is a ReadMe: it describes the data files ${files || '(none named)'} but holds no rows.`,
      'Upload a data file together with its ReadMe.',
      { line: last + 1 },
    );
  }
  if (description.endLine < 0) {
    const message = 'The byte-by-byte description breaks off before the rule that closes it.';
    throw new TableError('truncated', message, 'Fetch the table again.', { line: lines.length });
  }
  let first = last + 1;
  // Notes that no rule closes: "Note (1): ..." and what is indented below it.
  if (/^Notes?\b/.test(lines[first] ?? '')) while (/^(Notes?\b|\s{8})/.test(lines[first] ?? '')) first++;
  const dataStart = byteOfLine(content.head, first);
  return openDescribed(content, description, { dataStart, dataLine: first + 1 }, headline(lines), limits);
}

/** Opens a data file by the description in its ReadMe. */
export async function openWithReadMe(content: Content, readMe: Content, limits: ReaderLimits): Promise<OpenTable> {
  const { head } = await readHead(readMe.stream(), limits.maxHeadBytes);
  const lines = cellText(head).split('\n');
  const descriptions = readByteByByte(lines);
  const description = chooseDescription(descriptions, content.name);
  if (description === undefined) {
    const files = descriptions.flatMap((one) => one.files).join(', ');
    throw new TableError(
      'bad-header',
      files === ''
        ? 'The ReadMe holds no byte-by-byte description.'
        : `The ReadMe describes ${files}, but not ${content.name ?? 'this file'}.`,
      'Give the data file the name it has in the ReadMe, or upload the right ReadMe.',
    );
  }
  return openDescribed(content, description, { dataStart: 0, dataLine: 1 }, headline(lines), limits);
}

async function openDescribed(
  content: Content,
  description: ByteByByte,
  place: Pick<FixedWidthLayout, 'dataStart' | 'dataLine'>,
  title: string | undefined,
  limits: ReaderLimits,
): Promise<OpenTable> {
  const { columns, starts, ends, notes } = description;
  if (columns.length === 0) {
    throw new TableError('bad-header', 'The byte-by-byte description names no column.', 'Fetch the table again.');
  }
  if (columns.length > limits.maxColumns) {
    const message = `The description has ${columns.length} columns, more than the limit of ${limits.maxColumns}.`;
    throw new TableError(
      'too-many-columns',
      message,
      'Keep only the columns that are needed, or have the limit on columns raised.',
    );
  }
  if (detectEncoding(content.head).startsWith('utf-16')) {
    const message = 'The table is UTF-16, but its columns are counted in bytes.';
    throw new TableError('encoding', message, 'Save it as plain text (ASCII or UTF-8).', { byte: 0 });
  }
  const facts: TableFacts = {
    index: 0,
    name: tableName(content.name ?? description.files[0]),
    ...(title === undefined ? {} : { description: title }),
    columns,
    declaredRows: null,
    notes,
  };
  const rows = () => fixedWidthRows(content, columns, { starts, ends, ...place }, limits);
  const longs = columns.flatMap(({ type }, i) => (type === 'integer' && ends[i]! - starts[i]! > 15 ? [i] : []));
  await settleLongColumns(facts, longs, rows);
  return { format: 'mrt', tables: [facts], rows };
}

function chooseDescription(descriptions: ByteByByte[], name: string | undefined): ByteByByte | undefined {
  const bare = name?.replace(/\.gz$/i, '').replace(/^.*\//, '') ?? '';
  const named = descriptions.find(({ files }) => files.some((file) => matches(file, bare)));
  return named ?? (descriptions.length === 1 ? descriptions[0] : undefined);
}

function matches(pattern: string, name: string): boolean {
  const escaped = pattern
    .replace(/[.+^${}()|[\]\\]/g, '\\$&')
    .replace(/\*/g, '.*')
    .replaceAll('?', '.');
  return new RegExp(`^${escaped}$`, 'i').test(name);
}

/** Title and table line of the head. */
function headline(lines: string[]): string | undefined {
  const said = lines.slice(0, 40).flatMap((line) => /^(?:Title|Table)\s*:\s*(\S.*)$/i.exec(line)?.[1]?.trim() ?? []);
  return said.length === 0 ? undefined : said.join('. ');
}

function byteOfLine(head: Buffer, line: number): number {
  let at = 0;
  for (let passed = 0; passed < line; passed++) {
    const next = head.indexOf(10, at);
    if (next < 0) return head.length;
    at = next + 1;
  }
  return at;
}
