import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ColumnPackError, packColumns, textAt, textColumn, unpackColumns, type PackedColumns } from './column-pack.ts';
import { concatColumns, selectRows } from './column-rows.ts';

const table = (): PackedColumns => ({
  rows: 3,
  columns: {
    row: Uint32Array.of(1, 2, 4294967295),
    raDeg: Float64Array.of(0.1, NaN, -0),
    flag: Uint8Array.of(0, 1, 255),
    name: textColumn(['α Cen', '', 'x\u{1F30C}y']),
    depth: Float32Array.of(1.5, Infinity, -2),
    __proto__x: Int32Array.of(-1, 0, 2147483647),
  },
});
const cellsOf = ({ rows, columns }: PackedColumns) =>
  Object.entries(columns).map(([name, column]) => [
    name,
    'kind' in column ? Array.from({ length: rows }, (_, i) => textAt(column, i)) : Array.from(column),
  ]);

describe('a column pack', () => {
  it('gives back every value of every type, in the order of the columns', () => {
    expect(cellsOf(unpackColumns(packColumns(table())))).toEqual(cellsOf(table()));
  });
  it('gives back what it was given for any columns', () => {
    const tables = fc.integer({ min: 0, max: 9 }).chain((rows) => {
      const exactly = { minLength: rows, maxLength: rows };
      const column = fc.oneof(
        fc.array(fc.double(), exactly).map((v) => Float64Array.from(v)),
        fc.array(fc.nat(255), exactly).map((v) => Uint8Array.from(v)),
        fc.array(fc.string({ unit: 'grapheme' }), exactly).map((v) => textColumn(v)),
      );
      return fc
        .array(fc.tuple(fc.string(), column), { maxLength: 6 })
        .map((columns): PackedColumns => ({ rows, columns: Object.fromEntries(columns) }));
    });
    fc.assert(fc.property(tables, (t) => void expect(cellsOf(unpackColumns(packColumns(t)))).toEqual(cellsOf(t))));
  });
  it('keeps a column named __proto__', () => {
    const columns = Object.fromEntries([['__proto__', Uint8Array.of(7)]]);
    expect(cellsOf(unpackColumns(packColumns({ rows: 1, columns })))).toEqual([['__proto__', [7]]]);
  });
  it('holds a table without rows and one without columns', () => {
    const empty = { rows: 0, columns: { a: new Float64Array(0), b: textColumn([]) } };
    expect(cellsOf(unpackColumns(packColumns(empty)))).toEqual([
      ['a', []],
      ['b', []],
    ]);
    expect(unpackColumns(packColumns({ rows: 5, columns: {} })).rows).toBe(5);
  });
  it('reads without copying, also over shared memory', () => {
    const blob = packColumns(table(), (bytes) => new Uint8Array(new SharedArrayBuffer(bytes)));
    const { columns } = unpackColumns(blob);
    expect((columns['raDeg'] as Float64Array).buffer).toBe(blob.buffer);
    expect(cellsOf({ rows: 3, columns })).toEqual(cellsOf(table()));
  });
  it('reads a blob that starts at an odd address', () => {
    const blob = packColumns(table());
    const moved = new Uint8Array(blob.length + 3);
    moved.set(blob, 3);
    expect(cellsOf(unpackColumns(moved.subarray(3)))).toEqual(cellsOf(table()));
  });
  it('writes the same bytes twice', () => {
    expect(Buffer.compare(packColumns(table()), packColumns(table()))).toBe(0);
  });
  it('refuses a blob cut at any place', () => {
    const blob = packColumns(table());
    for (let end = 0; end < blob.length; end++) {
      expect(() => unpackColumns(blob.slice(0, end)), `cut at ${end}`).toThrow(ColumnPackError);
    }
  });
  it('reads or refuses a blob with any one byte changed, and never fails otherwise', () => {
    const blob = packColumns(table());
    let refused = 0;
    for (let at = 0; at < blob.length; at++) {
      const bad = blob.slice();
      bad[at] = bad[at]! ^ 0x55;
      try {
        cellsOf(unpackColumns(bad));
      } catch (error) {
        expect(error).toBeInstanceOf(ColumnPackError);
        refused++;
      }
    }
    expect(refused).toBeGreaterThan(24);
  });
  it('names the column that has too few rows', () => {
    expect(() => packColumns({ rows: 2, columns: { raDeg: Float64Array.of(1) } })).toThrow(/"raDeg" has 1 rows.* 2/);
  });
  it('names the version it cannot read', () => {
    const blob = packColumns(table());
    blob[4] = 9;
    expect(() => unpackColumns(blob)).toThrow(/version 9/);
  });
});

describe('a text column', () => {
  it('keeps cells apart that end and begin with halves of one character', () => {
    const column = textColumn(['a\ud83c', '\udf0cb']);
    expect([textAt(column, 0), textAt(column, 1)]).toEqual(['a\ufffd', '\ufffdb']);
  });
  it('refuses a row it does not have', () => {
    expect(() => textAt(textColumn(['a']), 1)).toThrow(ColumnPackError);
  });
});

describe('rows of columns', () => {
  it('are joined end to end', () => {
    const joined = concatColumns([table(), selectRows(table(), Uint32Array.of(2)), table()]);
    expect(joined.rows).toBe(7);
    const expected = cellsOf(table()).map(([name, v]) => [name, [...v!, v![2], ...v!]]);
    expect(cellsOf(joined)).toEqual(expected);
  });
  it('are picked in the order asked, again if asked again', () => {
    const picked = cellsOf(selectRows(table(), Uint32Array.of(2, 0, 0)));
    expect(picked).toEqual(cellsOf(table()).map(([name, v]) => [name, [v![2], v![0], v![0]]]));
  });
  it('are not joined when a column is missing, extra or of another type', () => {
    const a = { rows: 1, columns: { x: Float64Array.of(1) } };
    const b = { rows: 1, columns: { x: Float32Array.of(1) } };
    const c = { rows: 1, columns: { x: Float64Array.of(1), y: Float64Array.of(1) } };
    for (const pair of [
      [a, b],
      [a, c],
      [c, a],
    ])
      expect(() => concatColumns(pair)).toThrow(ColumnPackError);
  });
  it('are not picked from outside the table', () => {
    expect(() => selectRows(table(), Uint32Array.of(3))).toThrow(/index 3 .* 3 rows/);
  });
});
