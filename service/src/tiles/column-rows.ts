import { type Memory, plainMemory } from '../matching/memory.ts';
import { type Column, ColumnPackError, type NumberColumn, type PackedColumns, type TextColumn } from './column-pack.ts';

const isText = (column: Column): column is TextColumn => 'kind' in column;

const emptyLike = <T extends NumberColumn>(column: T, length: number, memory: Memory): T =>
  new (column.constructor as new (memory: ArrayBufferLike) => T)(memory(length * column.BYTES_PER_ELEMENT));

function concatText(parts: TextColumn[], rows: number, memory: Memory): TextColumn {
  const total = parts.reduce((sum, part) => sum + part.bytes.length, 0);
  if (total > 0xffffffff) throw new ColumnPackError(`a text column of ${total} bytes is over the limit of 4 GiB`);
  const offsets = new Uint32Array(memory(4 * (rows + 1)));
  const bytes = new Uint8Array(memory(total));
  let row = 0;
  let end = 0;
  for (const part of parts) {
    bytes.set(part.bytes, end);
    for (let i = 1; i < part.offsets.length; i++) offsets[++row] = end + part.offsets[i]!;
    end += part.bytes.length;
  }
  return { kind: 'text', offsets, bytes };
}

function concatNumbers(parts: NumberColumn[], rows: number, memory: Memory): NumberColumn {
  const joined = emptyLike(parts[0]!, rows, memory);
  let at = 0;
  for (const part of parts) {
    joined.set(part, at);
    at += part.length;
  }
  return joined;
}

/**
 * Joins tables end to end, rows in the order given; the column order is that of the first.
 *
 * @throws {ColumnPackError} if the tables do not all have the same columns of the same types
 */
export function concatColumns(list: readonly PackedColumns[], memory = plainMemory): PackedColumns {
  const first = list[0];
  if (!first) return { rows: 0, columns: {} };
  if (list.length === 1 && memory === plainMemory) return first;
  const rows = list.reduce((sum, table) => sum + table.rows, 0);
  const names = Object.keys(first.columns);
  const join = (name: string): [string, Column] => {
    const parts = list.map((table) => {
      const part = table.columns[name];
      if (part?.constructor !== first.columns[name]!.constructor) {
        throw new ColumnPackError(`cannot join tables: column "${name}" is missing from one or of another type there`);
      }
      return part;
    });
    return [
      name,
      parts.every(isText) ? concatText(parts, rows, memory) : concatNumbers(parts as NumberColumn[], rows, memory),
    ];
  };
  for (const { columns } of list) {
    const extra = Object.keys(columns).find((name) => !Object.hasOwn(first.columns, name));
    if (extra !== undefined) throw new ColumnPackError(`cannot join tables: only one has a column "${extra}"`);
  }
  return { rows, columns: Object.fromEntries(names.map(join)) };
}

function selectText({ offsets, bytes }: TextColumn, indices: Uint32Array, memory: Memory): TextColumn {
  const picked = new Uint32Array(memory(4 * (indices.length + 1)));
  for (let i = 0; i < indices.length; i++) {
    const from = indices[i]!;
    picked[i + 1] = picked[i]! + offsets[from + 1]! - offsets[from]!;
  }
  const text = new Uint8Array(memory(picked[indices.length]!));
  for (let i = 0; i < indices.length; i++) {
    const from = indices[i]!;
    text.set(bytes.subarray(offsets[from]!, offsets[from + 1]!), picked[i]!);
  }
  return { kind: 'text', offsets: picked, bytes: text };
}

function selectNumbers<T extends NumberColumn>(column: T, indices: Uint32Array, memory: Memory): T {
  const picked = emptyLike(column, indices.length, memory);
  for (let i = 0; i < indices.length; i++) picked[i] = column[indices[i]!]!;
  return picked;
}

/**
 * Copies chosen rows, in the order given; a row may be chosen more than once.
 *
 * @param indices 0-based positions in the table (not data row numbers of its file)
 * @throws {ColumnPackError} if an index is outside the table
 */
export function selectRows(
  { rows, columns }: PackedColumns,
  indices: Uint32Array,
  memory = plainMemory,
): PackedColumns {
  const astray = indices.find((index) => index >= rows);
  if (astray !== undefined) throw new ColumnPackError(`no row at index ${astray} in a table of ${rows} rows`);
  const pick = ([name, column]: [string, Column]): [string, Column] => [
    name,
    isText(column) ? selectText(column, indices, memory) : selectNumbers(column, indices, memory),
  ];
  return { rows: indices.length, columns: Object.fromEntries(Object.entries(columns).map(pick)) };
}
