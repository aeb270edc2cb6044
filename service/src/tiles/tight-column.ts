import { type Column, ColumnPackError, type NumberColumn, type TextColumn } from './column-pack.ts';
import { looseFloats, room, tightFloats } from './tight-floats.ts';
import type { Bits, Layout, NumberType } from './tight-layout.ts';

const TYPES = { f64: Float64Array, f32: Float32Array, i32: Int32Array, u32: Uint32Array, u8: Uint8Array } as const;
const UNSIGNED = { 8: Uint8Array, 16: Uint16Array, 32: Uint32Array } as const;
/** Values that are missing in more than this share of the rows are laid down without them. */
const SPARSE_SHARE = 0.25;

type Codes = Uint8Array | Uint16Array | Uint32Array;
export interface TightColumn {
  layout: Layout;
  parts: (NumberColumn | Uint16Array)[];
}
/** Gives the next `count` elements, made by `view` over their place in the blob. */
export type Take = <T>(count: number, width: number, view: (buffer: ArrayBufferLike, at: number) => T) => T;

/** The shortest layout known that gives a column back value for value. */
export function tighten(column: Column): TightColumn {
  if ('kind' in column) return tightText(column);
  const type = typeOf(column);
  if (isConstant(column)) {
    const value = column[0]!;
    return { layout: { as: 'constant', type, value: Number.isNaN(value) ? null : value }, parts: [] };
  }
  if (column instanceof Float64Array) return tightDoubles(column);
  if (type === 'u32' || type === 'i32') return tightWhole(column as Int32Array | Uint32Array, type);
  return plain(column, type);
}

/** The column again; a view of the blob where it is laid down plain. @throws {ColumnPackError} for damaged text */
export function loosen(layout: Layout, rows: number, take: Take): Column {
  switch (layout.as) {
    case 'plain': {
      const type = TYPES[layout.type] as new (buffer: ArrayBufferLike, at: number, count: number) => NumberColumn;
      return take(rows, TYPES[layout.type].BYTES_PER_ELEMENT, (buffer, at) => new type(buffer, at, rows));
    }
    case 'constant':
      return new TYPES[layout.type](rows).fill(layout.value ?? NaN);
    case 'decimal':
      return looseFloats({ ...layout, codes: takeCodes(layout.bits, rows, take) });
    case 'sparse': {
      const given = takeCodes(8, Math.ceil(rows / 8), take);
      return spread(given, loosen(layout.values, layout.count, take) as Float64Array, rows);
    }
    case 'offset': {
      const values = new TYPES[layout.type](rows);
      const codes = takeCodes(layout.bits, rows, take);
      for (let i = 0; i < rows; i++) values[i] = codes[i]! + layout.from;
      return values;
    }
    case 'step': {
      const values = new Uint32Array(rows);
      const steps = takeCodes(layout.bits, rows, take);
      let value = layout.from;
      for (let i = 0; i < rows; i++) values[i] = value += steps[i]!;
      return values;
    }
    case 'even': {
      const offsets = new Uint32Array(rows + 1);
      for (let i = 1; i <= rows; i++) offsets[i] = i * layout.width;
      return { kind: 'text', offsets, bytes: takeCodes(8, layout.bytes, take) as Uint8Array };
    }
    case 'text': {
      const lengths = takeCodes(layout.bits, rows, take);
      const offsets = new Uint32Array(rows + 1);
      for (let i = 0; i < rows; i++) offsets[i + 1] = offsets[i]! + lengths[i]!;
      if (offsets[rows] !== layout.bytes) throw new ColumnPackError('column pack is damaged: text cells are astray');
      return { kind: 'text', offsets, bytes: takeCodes(8, layout.bytes, take) as Uint8Array };
    }
  }
}

const plain = (column: NumberColumn, type: NumberType): TightColumn => ({
  layout: { as: 'plain', type },
  parts: [column],
});

function typeOf(column: NumberColumn): NumberType {
  for (const [type, array] of Object.entries(TYPES)) if (column instanceof array) return type as NumberType;
  throw new ColumnPackError(`no packing for a column of type ${Object.prototype.toString.call(column)}`);
}

/** Whether all values are one that JSON can tell, which a negative zero and an infinity are not. */
function isConstant(column: NumberColumn): boolean {
  const first = column[0];
  if (first === undefined || Object.is(first, -0) || Math.abs(first) === Infinity) return false;
  for (let i = 1; i < column.length; i++) if (!Object.is(column[i], first)) return false;
  return true;
}

function tightDoubles(values: Float64Array): TightColumn {
  let missing = 0;
  for (let i = 0; i < values.length; i++) if (values[i] !== values[i]) missing++;
  if (missing <= values.length * SPARSE_SHARE) return dense(values);
  const given = new Uint8Array(Math.ceil(values.length / 8));
  const rest = new Float64Array(values.length - missing);
  let count = 0;
  for (let i = 0; i < values.length; i++) {
    if (values[i] !== values[i]) continue;
    given[i >> 3]! |= 1 << (i & 7);
    rest[count++] = values[i]!;
  }
  const { layout, parts } = dense(rest);
  return { layout: { as: 'sparse', values: layout, count }, parts: [given, ...parts] };
}

function dense(values: Float64Array): TightColumn {
  const tight = tightFloats(values);
  if (!tight) return plain(values, 'f64');
  const { decimals, from, codes } = tight;
  return { layout: { as: 'decimal', decimals, from, bits: bitsOf(codes) }, parts: [codes] };
}

function tightWhole(values: Int32Array | Uint32Array, type: 'i32' | 'u32'): TightColumn {
  let [low, high, step] = [values[0] ?? 0, values[0] ?? 0, 0];
  let rises = type === 'u32';
  for (let i = 1; i < values.length; i++) {
    const by = values[i]! - values[i - 1]!;
    if (by > step) step = by;
    if (by < 0) rises = false;
    if (values[i]! < low) low = values[i]!;
    if (values[i]! > high) high = values[i]!;
  }
  const codes = room(rises ? step : high - low, values.length);
  if (codes.BYTES_PER_ELEMENT === 4) return plain(values, type);
  if (rises) for (let i = 1; i < values.length; i++) codes[i] = values[i]! - values[i - 1]!;
  else for (let i = 0; i < values.length; i++) codes[i] = values[i]! - low;
  const bits = bitsOf(codes);
  const layout: Layout = rises ? { as: 'step', from: low, bits } : { as: 'offset', type, from: low, bits };
  return { layout, parts: [codes] };
}

function tightText({ offsets, bytes }: TextColumn): TightColumn {
  const rows = offsets.length - 1;
  const lengths = new Uint32Array(rows);
  let most = 0;
  let even = rows > 0;
  for (let i = 0; i < rows; i++) {
    const length = offsets[i + 1]! - offsets[i]!;
    lengths[i] = length;
    if (length > most) most = length;
    if (length !== lengths[0]) even = false;
  }
  if (even) return { layout: { as: 'even', width: most, bytes: bytes.length }, parts: [bytes] };
  const own = room(most, rows);
  own.set(lengths);
  return { layout: { as: 'text', bits: bitsOf(own), bytes: bytes.length }, parts: [own, bytes] };
}

function spread(given: Codes, values: Float64Array, rows: number): Float64Array {
  const all = new Float64Array(rows).fill(NaN);
  let next = 0;
  for (let i = 0; i < rows; i++) if ((given[i >> 3]! & (1 << (i & 7))) !== 0) all[i] = values[next++]!;
  return all;
}

const bitsOf = (codes: Codes): Bits => (codes.BYTES_PER_ELEMENT * 8) as Bits;

function takeCodes(bits: Bits, count: number, take: Take): Codes {
  const type = UNSIGNED[bits] as new (buffer: ArrayBufferLike, at: number, count: number) => Uint16Array;
  return take(count, bits / 8, (buffer, at) => new type(buffer, at, count));
}
