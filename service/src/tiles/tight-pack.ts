import { type Column, ColumnPackError, type PackedColumns, unpackColumns } from './column-pack.ts';
import { loosen, type Take, tighten } from './tight-column.ts';
import { isLayout, type Layout, partsOf } from './tight-layout.ts';

const MAGIC = 0x54505245; // 'ERPT' read little-endian
const VERSION = 1;
const HEAD_BYTES = 24;
const align = (bytes: number): number => Math.ceil(bytes / 8) * 8;

/** A packed table whose columns are unpacked one by one, when they are asked for. */
export interface OpenPack {
  rows: number;
  names: string[];
  /** Undefined for a column it does not have. @throws {ColumnPackError} where the blob is damaged */
  column(name: string): Column | undefined;
}

/**
 * Writes columns into one blob as `packColumns` does, but each in the shortest form that gives it back value for
 * value: catalogues print decimals, so it is mostly half the bytes. For what is stored; what threads share is plain.
 *
 * @throws {ColumnPackError} if a column has another number of rows than the table
 */
export function packTight({ rows, columns }: PackedColumns): Uint8Array {
  const directory: [string, Layout][] = [];
  const parts: Uint8Array[] = [];
  let size = 0;
  for (const [name, column] of Object.entries(columns)) {
    const length = 'kind' in column ? column.offsets.length - 1 : column.length;
    if (length !== rows) throw new ColumnPackError(`column "${name}" has ${length} rows, the table has ${rows}`);
    const tight = tighten(column);
    directory.push([name, tight.layout]);
    for (const { buffer, byteOffset, byteLength } of tight.parts) {
      parts.push(new Uint8Array(buffer, byteOffset, byteLength));
      size += align(byteLength);
    }
  }
  const text = Buffer.from(JSON.stringify(directory));
  let at = align(HEAD_BYTES + text.length);
  const blob = new Uint8Array(at + size);
  const head = new DataView(blob.buffer);
  head.setUint32(0, MAGIC, true);
  head.setUint32(4, VERSION, true);
  head.setUint32(8, rows, true);
  head.setUint32(12, text.length, true);
  head.setFloat64(16, blob.length, true);
  blob.set(text, HEAD_BYTES);
  for (const part of parts) {
    blob.set(part, at);
    at += align(part.length);
  }
  return blob;
}

/** Opens a blob of {@link packTight}, or one of `packColumns`. @throws {ColumnPackError} where it is damaged */
export function openPack(bytes: Uint8Array): OpenPack {
  const blob = bytes.byteOffset % 8 === 0 ? bytes : Uint8Array.from(bytes);
  const head = new DataView(blob.buffer, blob.byteOffset, blob.byteLength);
  if (blob.length < HEAD_BYTES || head.getUint32(0, true) !== MAGIC) {
    const { rows, columns } = unpackColumns(blob);
    return { rows, names: Object.keys(columns), column: (name) => columns[name] };
  }
  const version = head.getUint32(4, true);
  if (version !== VERSION)
    throw new ColumnPackError(`column pack has version ${version}, this program reads ${VERSION}`);
  if (head.getFloat64(16, true) !== blob.length) {
    const told = head.getFloat64(16, true);
    throw new ColumnPackError(`column pack is damaged: ${blob.length} bytes long, its head says ${told}`);
  }
  const rows = head.getUint32(8, true);
  const length = head.getUint32(12, true);
  const places = new Map<string, { layout: Layout; at: number }>();
  let at = align(HEAD_BYTES + length);
  for (const [name, layout] of readDirectory(blob, length, rows)) {
    places.set(name, { layout, at });
    for (const [count, width] of partsOf(layout, rows)) at += align(count * width);
  }
  if (at !== blob.length) throw new ColumnPackError('column pack is damaged: its columns do not fill it');
  const column = (name: string): Column | undefined => {
    const place = places.get(name);
    try {
      return place && loosen(place.layout, rows, takeFrom(blob, place.at));
    } catch (error) {
      if (!(error instanceof RangeError)) throw error;
      throw new ColumnPackError(`column pack is damaged: column "${name}" cannot have ${rows} rows`);
    }
  };
  return { rows, names: [...places.keys()], column };
}

/** All columns of a blob of {@link packTight}, or of `packColumns`. @throws {ColumnPackError} where it is damaged */
export function unpackTight(bytes: Uint8Array): PackedColumns {
  const { rows, names, column } = openPack(bytes);
  return { rows, columns: Object.fromEntries(names.map((name) => [name, column(name)!])) };
}

function takeFrom(blob: Uint8Array, from: number): Take {
  let at = from;
  return (count, width, view) => {
    const place = blob.byteOffset + at;
    at += align(count * width);
    return view(blob.buffer, place);
  };
}

function readDirectory(blob: Uint8Array, length: number, rows: number): [string, Layout][] {
  let entries: unknown;
  try {
    const text = Uint8Array.from(blob.subarray(HEAD_BYTES, HEAD_BYTES + length));
    entries = JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(text));
  } catch {
    throw new ColumnPackError('column pack is damaged: its directory cannot be read');
  }
  const sound = (entry: unknown): entry is [string, Layout] =>
    Array.isArray(entry) && typeof entry[0] === 'string' && isLayout(entry[1], rows);
  if (!Array.isArray(entries) || !entries.every(sound)) {
    throw new ColumnPackError('column pack is damaged: its directory has an entry that makes no sense');
  }
  return entries;
}
