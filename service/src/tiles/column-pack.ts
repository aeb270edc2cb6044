/** Text cells end to end: cell `i` is UTF-8 `bytes[offsets[i] .. offsets[i + 1])`; an empty cell means missing. */
export interface TextColumn {
  kind: 'text';
  /** rows + 1 entries, not decreasing, the first 0 */
  offsets: Uint32Array;
  bytes: Uint8Array;
}
export type NumberColumn = Float64Array | Float32Array | Int32Array | Uint32Array | Uint8Array;
export type Column = NumberColumn | TextColumn;

/** A table held column by column; arrays may lie over an ArrayBuffer or a SharedArrayBuffer. */
export interface PackedColumns {
  rows: number;
  columns: Record<string, Column>;
}

/** Thrown for a blob that is not an intact column pack, and for columns that do not fit together. */
export class ColumnPackError extends Error {
  override readonly name = 'ColumnPackError';
}

const MAGIC = 0x4b505245; // 'ERPK' read little-endian: a blob written with the other byte order does not match
const VERSION = 1;
const HEAD_BYTES = 24;
const KINDS = { f64: Float64Array, f32: Float32Array, i32: Int32Array, u32: Uint32Array, u8: Uint8Array } as const;
type NumberKind = keyof typeof KINDS;
/** name, kind, offset of its data after the directory, bytes of its text (0 for numbers) */
type Entry = [name: string, kind: NumberKind | 'text', offset: number, textBytes: number];

const align = (bytes: number): number => Math.ceil(bytes / 8) * 8;
const isText = (column: Column): column is TextColumn => 'kind' in column;
const bytesOf = (array: NumberColumn): Uint8Array => new Uint8Array(array.buffer, array.byteOffset, array.byteLength);

function kindOf(column: Column): NumberKind | 'text' {
  if (isText(column)) return 'text';
  for (const [kind, type] of Object.entries(KINDS)) if (column instanceof type) return kind as NumberKind;
  throw new ColumnPackError(`no packing for a column of type ${Object.prototype.toString.call(column)}`);
}

function checkLength(name: string, column: Column, rows: number): void {
  const length = isText(column) ? column.offsets.length - 1 : column.length;
  if (length !== rows) throw new ColumnPackError(`column "${name}" has ${length} rows, the table has ${rows}`);
}

/** Offsets must start at 0, never decrease and end inside the bytes: checked so that no later read can go astray. */
function checkText(name: string, { offsets, bytes }: TextColumn): void {
  let last = 0;
  for (let i = 0; i < offsets.length; i++) {
    const next = offsets[i]!;
    if (next < last || (i === 0 && next !== 0))
      throw new ColumnPackError(`column "${name}": text offset ${i} is astray`);
    last = next;
  }
  if (last !== bytes.length) {
    throw new ColumnPackError(`column "${name}": text offsets end at ${last}, there are ${bytes.length} bytes`);
  }
}

/**
 * Writes columns into one blob: a head of 24 bytes, a directory in JSON, then each column aligned to 8 bytes.
 * The same columns in the same order give the same bytes.
 *
 * @param allocate where to write: pass a maker of views over a SharedArrayBuffer to share the blob between threads;
 *   it must return zeroed bytes at an offset divisible by 8
 * @throws {ColumnPackError} if a column has another number of rows than the table, or is of no known type
 */
export function packColumns(
  { rows, columns }: PackedColumns,
  allocate: (bytes: number) => Uint8Array = (bytes) => new Uint8Array(bytes),
): Uint8Array {
  const directory: Entry[] = [];
  let size = 0;
  for (const [name, column] of Object.entries(columns)) {
    checkLength(name, column, rows);
    if (isText(column)) checkText(name, column);
    directory.push([name, kindOf(column), size, isText(column) ? column.bytes.length : 0]);
    size += isText(column) ? align(column.offsets.byteLength) + align(column.bytes.length) : align(column.byteLength);
  }
  const text = new TextEncoder().encode(JSON.stringify(directory));
  const start = align(HEAD_BYTES + text.length);
  const blob = allocate(start + size);
  const head = new DataView(blob.buffer, blob.byteOffset, HEAD_BYTES);
  head.setUint32(0, MAGIC, true);
  head.setUint32(4, VERSION, true);
  head.setUint32(8, rows, true);
  head.setUint32(12, text.length, true);
  head.setFloat64(16, start + size, true);
  blob.set(text, HEAD_BYTES);
  for (const [name, , offset] of directory) {
    const column = columns[name]!;
    if (isText(column)) {
      blob.set(bytesOf(column.offsets), start + offset);
      blob.set(column.bytes, start + offset + align(column.offsets.byteLength));
    } else blob.set(bytesOf(column), start + offset);
  }
  return blob;
}

function readDirectory(bytes: Uint8Array, length: number): Entry[] {
  const known = (kind: unknown) => kind === 'text' || (typeof kind === 'string' && Object.hasOwn(KINDS, kind));
  const count = (value: unknown) => Number.isSafeInteger(value) && (value as number) >= 0;
  let entries: unknown;
  try {
    const text = Uint8Array.from(bytes.subarray(HEAD_BYTES, HEAD_BYTES + length));
    entries = JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(text));
  } catch {
    throw new ColumnPackError('column pack is damaged: its directory cannot be read');
  }
  const sound = (e: unknown): e is Entry =>
    Array.isArray(e) && typeof e[0] === 'string' && known(e[1]) && count(e[2]) && e[2] % 8 === 0 && count(e[3]);
  if (!Array.isArray(entries) || !entries.every(sound)) {
    throw new ColumnPackError('column pack is damaged: its directory has an entry that makes no sense');
  }
  return entries;
}

/**
 * Reads a blob of `packColumns`. The columns are views into the blob: nothing is copied, unless the blob starts at an
 * address not divisible by 8, in which case the whole blob is copied once. Writing to a column writes to the blob.
 *
 * @throws {ColumnPackError} if the blob is truncated, of another version or byte order, or inconsistent. Values are not
 *   checksummed: a flipped bit inside a number goes unseen here.
 */
export function unpackColumns(bytes: Uint8Array): PackedColumns {
  if (bytes.length < HEAD_BYTES) throw new ColumnPackError(`column pack is damaged: only ${bytes.length} bytes long`);
  const blob = bytes.byteOffset % 8 === 0 ? bytes : Uint8Array.from(bytes);
  const head = new DataView(blob.buffer, blob.byteOffset, HEAD_BYTES);
  if (head.getUint32(0, true) !== MAGIC) throw new ColumnPackError('these bytes are not a column pack');
  const version = head.getUint32(4, true);
  if (version !== VERSION)
    throw new ColumnPackError(`column pack has version ${version}, this program reads ${VERSION}`);
  const size = head.getFloat64(16, true);
  if (size !== blob.length) {
    throw new ColumnPackError(`column pack is damaged: ${blob.length} bytes long, its head says ${size}`);
  }
  const rows = head.getUint32(8, true);
  const length = head.getUint32(12, true);
  const start = align(HEAD_BYTES + length);
  const at = <T>(name: string, offset: number, count: number, width: number, view: (from: number) => T): T => {
    if (start + offset + count * width <= blob.length) return view(blob.byteOffset + start + offset);
    throw new ColumnPackError(`column pack is damaged: column "${name}" reaches beyond its end`);
  };
  const read = ([name, kind, offset, textBytes]: Entry): [string, Column] => {
    if (kind !== 'text') {
      const type: new (buffer: ArrayBufferLike, from: number, rows: number) => NumberColumn = KINDS[kind];
      return [name, at(name, offset, rows, KINDS[kind].BYTES_PER_ELEMENT, (from) => new type(blob.buffer, from, rows))];
    }
    const offsets = at(name, offset, rows + 1, 4, (from) => new Uint32Array(blob.buffer, from, rows + 1));
    const after = offset + align(offsets.byteLength);
    const text = at(name, after, textBytes, 1, (from) => new Uint8Array(blob.buffer, from, textBytes));
    const column: TextColumn = { kind: 'text', offsets, bytes: text };
    checkText(name, column);
    return [name, column];
  };
  return { rows, columns: Object.fromEntries(readDirectory(blob, length).map(read)) };
}

/** @returns a text column of the strings; an empty string stands for missing. Lone surrogates become U+FFFD. */
export function textColumn(strings: readonly string[]): TextColumn {
  const bytes = new TextEncoder().encode(strings.join(''));
  const offsets = new Uint32Array(strings.length + 1);
  for (let i = 0; i < strings.length; i++) offsets[i + 1] = offsets[i]! + Buffer.byteLength(strings[i]!, 'utf8');
  // A pair split between two cells would join into one character: then encode cell by cell.
  if (offsets[strings.length] === bytes.length) return { kind: 'text', offsets, bytes };
  const cells = strings.map((text) => new TextEncoder().encode(text));
  cells.forEach((cell, i) => (offsets[i + 1] = offsets[i]! + cell.length));
  return { kind: 'text', offsets, bytes: Buffer.concat(cells) };
}

/** @returns the text of row `i` (0-based); '' where missing */
export function textAt({ offsets, bytes }: TextColumn, i: number): string {
  const from = offsets[i];
  const to = offsets[i + 1];
  if (from === undefined || to === undefined) throw new ColumnPackError(`no row ${i} in a text column`);
  return Buffer.from(bytes.buffer, bytes.byteOffset + from, to - from).toString('utf8');
}
