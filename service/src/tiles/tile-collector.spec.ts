import { describe, expect, it } from 'vitest';
import { tileCells } from './cells.ts';
import { type PackedColumns, textColumn } from './column-pack.ts';
import { packOriginals, unpackOriginals } from './original-pack.ts';
import { rowCells } from './original-cells.ts';
import { PLACES_CELL, placesOf } from './row-places.ts';
import { unpackTight } from './tight-pack.ts';
import type { Tile } from './tile.ts';
import { TileCollector } from './tile-collector.ts';

/** Rows spread over a few cells, numbered with gaps, in chunks as a reader gives them. */
function chunks(count: number, chunkRows: number): { roles: PackedColumns; originals: PackedColumns }[] {
  const list = [];
  for (let from = 0; from < count; from += chunkRows) {
    const indices = Array.from({ length: Math.min(chunkRows, count - from) }, (_, i) => from + i);
    const raDeg = Float64Array.from(indices, (i) => (i * 37.7) % 360);
    const decDeg = Float64Array.from(indices, (i) => ((i * 13.3) % 170) - 85);
    const roles = {
      rows: indices.length,
      columns: { row: Uint32Array.from(indices, (i) => 3 * i + 1), raDeg, decDeg },
    };
    // The second column is text in some chunks only, as when a cell is no plain number.
    const odd = from % (2 * chunkRows) === 0;
    const c1 = odd ? textColumn(indices.map((i) => (i % 5 ? String(i) : 'x'))) : Float64Array.from(indices);
    const c0 = textColumn(indices.map((i) => `g${i}`));
    // The third column is the declination as it stands.
    const originals = { rows: indices.length, columns: { c0, c1, c2: decDeg.slice() } };
    list.push({ roles, originals });
  }
  return list;
}
function collect(count: number, chunkRows: number, bufferBytes: number): Tile[] {
  const collector = new TileCollector(bufferBytes);
  const tiles = chunks(count, chunkRows).flatMap(({ roles, originals }) => [...collector.add(roles, originals)]);
  return [...tiles, ...collector.finish()];
}

describe('a tile collector', () => {
  it.each([
    ['at once', 1e9],
    ['in many parts', 20_000],
  ])('puts every row into the tile of its cell, in file order, given out %s', (_, bufferBytes) => {
    const tiles = collect(5000, 300, bufferBytes);
    const seen = new Map<number, string[]>();
    for (const { cell, count, roles, originals } of tiles.filter((tile) => tile.cell !== PLACES_CELL)) {
      const unpacked = unpackTight(roles);
      const { rows, columns } = unpacked;
      expect(rows).toBe(count);
      const row = Array.from(columns['row'] as Uint32Array);
      expect(row).toEqual([...row].sort((a, b) => a - b));
      expect(new Set(tileCells(columns['raDeg'] as Float64Array, columns['decDeg'] as Float64Array))).toEqual(
        new Set([cell]),
      );
      const cells = unpackOriginals(originals, unpacked);
      row.forEach((number, i) => seen.set(number, rowCells(cells, i)));
    }
    expect(seen.size).toBe(5000);
    expect(seen.get(3 * 10 + 1)).toEqual(['g10', 'x', String(((10 * 13.3) % 170) - 85)]);
    expect(seen.get(3 * 11 + 1)).toEqual(['g11', '11', String(((11 * 13.3) % 170) - 85)]);
    expect(seen.get(3 * 301 + 1)).toEqual(['g301', '301', String(((301 * 13.3) % 170) - 85)]);
  });

  it('keeps an original column that became a role unchanged only once, as long as that holds for every row', () => {
    const [{ roles, originals }] = chunks(1000, 1000) as [ReturnType<typeof chunks>[0]];
    const kept = (c2: Float64Array) => {
      const collector = new TileCollector(1e9);
      collector.add({ ...roles }, { rows: 1000, columns: { ...originals.columns, c2 } });
      return [...collector.finish()].filter((tile) => Buffer.from(tile.originals).includes('["c2",{"as"')).length;
    };
    const declinations = (originals.columns['c2'] as Float64Array).slice();
    expect(kept(declinations)).toBe(0);
    declinations[999] = 1;
    expect(kept(declinations)).toBeGreaterThan(10);
  });

  it('refuses originals that do not belong to the roles', () => {
    const dec = Float64Array.of(1, 2);
    const blob = packOriginals({ rows: 2, columns: {} }, ['c0'], new Map([['c0', 'decDeg']]));
    expect(unpackOriginals(blob, { rows: 2, columns: { decDeg: dec } }).columns['c0']).toBe(dec);
    expect(() => unpackOriginals(blob, { rows: 2, columns: {} })).toThrow(/lack the column "decDeg"/);
    expect(() => unpackOriginals(blob, { rows: 1, columns: { decDeg: dec } })).toThrow(/2 rows, its roles 1/);
  });

  it('gives no two tiles the same cell and part', () => {
    const keys = collect(5000, 300, 20_000).map(({ cell, part }) => `${cell}:${part}`);
    expect(new Set(keys).size).toBe(keys.length);
    expect(keys.length).toBeGreaterThan(100);
  });

  it('knows the place of every row', () => {
    const tiles = collect(60_000, 4096, 500_000);
    const byPlace = new Map(tiles.map((tile) => [`${tile.cell}:${tile.part}`, tile]));
    const blocks = tiles.filter(({ cell }) => cell === PLACES_CELL);
    const places = blocks.flatMap(({ roles }) => placesOf(roles));
    expect(places.map(({ row }) => row)).toEqual(Array.from({ length: 60_000 }, (_, i) => 3 * i + 1));
    expect(blocks.map(({ part }) => part)).toEqual([0, 1, 2]);
    for (const { row, cell, part, at } of places.filter((_, i) => i % 997 === 0)) {
      const { columns } = unpackTight(byPlace.get(`${cell}:${part}`)!.roles);
      expect((columns['row'] as Uint32Array)[at]).toBe(row);
    }
  });
});
