import { columnAs } from './column-as.ts';
import { openTable } from '../tables/open-table.ts';
import {
  type ByteSource,
  type ColumnFacts,
  type OpenTable,
  type ReaderLimits,
  type RowChunk,
  TableError,
  type TableFacts,
} from '../tables/table.ts';

/** Rows that one file gave to a catalogue of several; rows are numbered on from file to file. */
export interface PartRows {
  fileName: string;
  /** 1-based number of its first row in the catalogue. */
  firstRow: number;
  rows: number;
}

interface OpenPart {
  name: string;
  open: OpenTable;
  table: TableFacts;
  /** Place in the part of each column of the first file. */
  places: number[];
}

/** Several files read as one table: cones, tiles or strips of one catalogue. */
export interface JoinedParts {
  /** All rows of the first file and then of each part. A file that breaks off keeps its rows; the break is told last. */
  rows(): AsyncIterable<RowChunk>;
  /** What each file gave, filled while `rows` is read. */
  given: PartRows[];
}

/**
 * Opens further files of a catalogue. Columns are found by name, in any order; each file must have the same.
 *
 * @param name of the first file
 * @throws {TableError} for a part that is no table, or has other columns or units: it names the part
 */
export async function joinParts(
  first: OpenTable,
  table: TableFacts,
  name: string,
  parts: readonly ByteSource[],
  limits: Partial<ReaderLimits>,
): Promise<JoinedParts> {
  const opened: OpenPart[] = [];
  for (const source of parts) opened.push(await openPart(source, table.columns, name, limits));
  const all: OpenPart[] = [{ name, open: first, table, places: table.columns.map((_, i) => i) }, ...opened];
  const given: PartRows[] = [];
  async function* rows(): AsyncIterable<RowChunk> {
    given.length = 0;
    let before = 0;
    let broken: TableError | undefined;
    for (const part of all) {
      const own: PartRows = { fileName: part.name, firstRow: before + 1, rows: 0 };
      given.push(own);
      try {
        for await (const chunk of part.open.rows(part.table.index)) {
          own.rows += chunk.rows + (chunk.broken?.length ?? 0);
          yield moved(chunk, before, part.places, table.columns);
        }
      } catch (error) {
        if (!(error instanceof TableError)) throw error;
        broken ??= told(part.name, error);
      }
      before += own.rows;
    }
    if (broken) throw broken;
  }
  return { rows, given };
}

async function openPart(
  source: ByteSource,
  columns: readonly ColumnFacts[],
  firstName: string,
  limits: Partial<ReaderLimits>,
): Promise<OpenPart> {
  const name = source.name ?? 'a part';
  let open: OpenTable;
  try {
    open = await openTable(source, limits);
  } catch (error) {
    throw error instanceof TableError ? told(name, error) : error;
  }
  const names = columns.map((column) => column.name);
  const holds = ({ columns: own }: TableFacts) =>
    own.length === names.length && names.every((wanted) => own.some((column) => column.name === wanted));
  const table = open.tables.find(holds);
  if (!table) throw unlike(name, firstName, names, open.tables[0]!);
  const places = names.map((wanted) => table.columns.findIndex((column) => column.name === wanted));
  for (const [i, { unit }] of columns.entries()) {
    const other = table.columns[places[i]!]!.unit;
    if (unit === other || unit === undefined || other === undefined) continue;
    throw new TableError(
      'bad-header',
      `"${names[i]}" is in ${other} in "${name}" and in ${unit} in "${firstName}".`,
      'Parts of one catalogue must have the same units: publish it apart.',
    );
  }
  return { name, open, table, places };
}

function unlike(name: string, firstName: string, wanted: readonly string[], { columns }: TableFacts): TableError {
  const own = columns.map((column) => column.name);
  const list = (names: string[]) => names.slice(0, 8).join(', ') + (names.length > 8 ? ', …' : '');
  const lacking = wanted.filter((column) => !own.includes(column));
  const more = own.filter((column) => !wanted.includes(column));
  const what = [lacking.length && `it lacks ${list(lacking)}`, more.length && `it also has ${list(more)}`];
  return new TableError(
    'bad-header',
    `"${name}" does not have the columns of "${firstName}": ${what.filter(Boolean).join('; ')}.`,
    'Parts of one catalogue must have the same columns: publish it apart.',
  );
}

function told(name: string, { code, message, mend, line, column, byte, rowsRead }: TableError): TableError {
  const place = Object.entries({ line, column, byte, rowsRead }).filter(([, value]) => value !== undefined);
  return new TableError(code, `"${name}": ${message}`, mend, Object.fromEntries(place));
}

/** A chunk of a part with its rows numbered on and its columns in the order of the first file. */
function moved(chunk: RowChunk, by: number, places: readonly number[], columns: readonly ColumnFacts[]): RowChunk {
  const isText = ({ type }: ColumnFacts) => type === 'text' || type === 'boolean';
  return {
    ...chunk,
    firstRow: chunk.firstRow + by,
    columns: places.map((place, i) => columnAs(chunk.columns[place]!, chunk.rows, isText(columns[i]!))),
    ...(chunk.rowNumbers ? { rowNumbers: chunk.rowNumbers.map((row) => row + by) } : {}),
    ...(chunk.broken ? { broken: chunk.broken.map((one) => ({ ...one, row: one.row + by })) } : {}),
  };
}
