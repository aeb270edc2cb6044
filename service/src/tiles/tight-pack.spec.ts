import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ColumnPackError, packColumns, type PackedColumns, textAt, textColumn } from './column-pack.ts';
import { openPack, packTight, unpackTight } from './tight-pack.ts';

const cellsOf = ({ rows, columns }: PackedColumns) =>
  Object.entries(columns).map(([name, column]) => [
    name,
    'kind' in column ? 'text' : column.constructor.name,
    'kind' in column ? Array.from({ length: rows }, (_, i) => textAt(column, i)) : Array.from(column),
  ]);

/** A column of each layout. */
const table = (): PackedColumns => ({
  rows: 4,
  columns: {
    row: Uint32Array.of(7, 9, 1000, 4294967295),
    near: Uint32Array.of(7, 9, 9, 30),
    mag: Float64Array.of(21.15253, 20.7, NaN, -3),
    zero: Float64Array.of(0.5, -0, 1, 2),
    full: Float64Array.of(Math.PI, Math.E, 1 / 3, 1e300),
    sparse: Float64Array.of(NaN, NaN, NaN, 0.119416),
    none: new Float64Array(4).fill(NaN),
    limit: new Uint8Array(4),
    cell: Int32Array.of(-1, 5000, 12287, 3),
    far: Float32Array.of(1.5, Infinity, -2, NaN),
    even: textColumn(['αb', 'abc', 'xyz', 'uvw']),
    name: textColumn(['', 'α Cen', 'x', 'a'.repeat(300)]),
    blank: textColumn(['', '', '', '']),
  },
});

const printed = fc
  .tuple(fc.integer({ min: -999_999_999, max: 999_999_999 }), fc.nat(10))
  .map(([digits, decimals]) => Number(`${digits}e-${decimals}`));

describe('a tight pack', () => {
  it('gives back every value of every type, in the order of the columns', () => {
    expect(cellsOf(unpackTight(packTight(table())))).toEqual(cellsOf(table()));
  });
  it('gives back what it was given for any columns', () => {
    const tables = fc.integer({ min: 0, max: 20 }).chain((rows) => {
      const exactly = { minLength: rows, maxLength: rows };
      const column = fc.oneof(
        fc.array(fc.double(), exactly).map((v) => Float64Array.from(v)),
        fc.array(printed, exactly).map((v) => Float64Array.from(v)),
        fc.array(fc.oneof(printed, fc.constant(NaN), fc.constant(-0)), exactly).map((v) => Float64Array.from(v)),
        fc.array(fc.float(), exactly).map((v) => Float32Array.from(v)),
        fc.array(fc.nat(2 ** 32 - 1), exactly).map((v) => Uint32Array.from(v)),
        fc.array(fc.nat(2 ** 32 - 1), exactly).map((v) => Uint32Array.from(v).sort()),
        fc.array(fc.nat(300), exactly).map((v) => Uint32Array.from(v).sort()),
        fc.array(fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 }), exactly).map((v) => Int32Array.from(v)),
        fc.array(fc.integer({ min: -40, max: 40 }), exactly).map((v) => Int32Array.from(v)),
        fc.array(fc.nat(255), exactly).map((v) => Uint8Array.from(v)),
        fc.array(fc.string({ unit: 'grapheme' }), exactly).map((v) => textColumn(v)),
      );
      return fc
        .array(fc.tuple(fc.string(), column), { maxLength: 6 })
        .map((columns): PackedColumns => ({ rows, columns: Object.fromEntries(columns) }));
    });
    const check = fc.property(tables, (t) => void expect(cellsOf(unpackTight(packTight(t)))).toEqual(cellsOf(t)));
    fc.assert(check, { numRuns: 500 });
  });
  it('needs four bytes for a coordinate of eight decimals and two for an error of five', () => {
    const at = (low: number, decimals: number, spread: number) =>
      Float64Array.from({ length: 1000 }, (_, i) => Number((low + ((i * 0.618) % 1) * spread).toFixed(decimals)));
    const bytes = (column: Float64Array) => packTight({ rows: 1000, columns: { x: column } }).length;
    expect(bytes(at(152, 8, 1.8))).toBeLessThan(4200);
    expect(bytes(at(0.01, 5, 0.1))).toBeLessThan(2200);
  });
  it('reads what was packed plainly', () => {
    expect(cellsOf(unpackTight(packColumns(table())))).toEqual(cellsOf(table()));
  });
  it('unpacks one column alone', () => {
    const pack = openPack(packTight(table()));
    expect(Array.from(pack.column('mag') as Float64Array)).toEqual([21.15253, 20.7, NaN, -3]);
    expect(pack.column('nothing')).toBeUndefined();
  });
  it('reads a blob that starts at an odd address', () => {
    const blob = packTight(table());
    const moved = new Uint8Array(blob.length + 3);
    moved.set(blob, 3);
    expect(cellsOf(unpackTight(moved.subarray(3)))).toEqual(cellsOf(table()));
  });
  it('refuses a blob cut at any place', () => {
    const blob = packTight(table());
    for (let end = 0; end < blob.length; end++) {
      expect(() => unpackTight(blob.slice(0, end)), `cut at ${end}`).toThrow(ColumnPackError);
    }
  });
  it('reads or refuses a blob with any one byte changed, and never fails otherwise', () => {
    const blob = packTight(table());
    for (let at = 0; at < blob.length; at++) {
      const bad = blob.slice();
      bad[at] = bad[at]! ^ 0x55;
      try {
        cellsOf(unpackTight(bad));
      } catch (error) {
        expect(error, `byte ${at}`).toBeInstanceOf(ColumnPackError);
      }
    }
  });
  it('names the column that has too few rows', () => {
    expect(() => packTight({ rows: 2, columns: { raDeg: Float64Array.of(1) } })).toThrow(/"raDeg" has 1 rows.* 2/);
  });
});
