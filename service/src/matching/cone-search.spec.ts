import { describe, expect, it } from 'vitest';
import { buildZoneGrid } from './build-zone-grid.ts';
import { buildConeIndex, coneIndexFrom } from './cone-index.ts';
import { coneSearch, nearestRows } from './cone-search.ts';
import { pairSearch } from './pair-search.ts';
import { evenSky, near, type SkyPoints, testSeparation } from './testing/brute-force.ts';

const rows: SkyPoints = (() => {
  const even = evenSky(3000, 41);
  const polar = evenSky(300, 42, 89.5, 90);
  const same = near({ raDeg: new Float64Array(20).fill(359.9999), decDeg: new Float64Array(20) }, 0, 43);
  const all = [even, polar, same];
  return {
    raDeg: Float64Array.from(all.flatMap(({ raDeg }) => [...raDeg])),
    decDeg: Float64Array.from(all.flatMap(({ decDeg }) => [...decDeg])),
  };
})();
const index = buildConeIndex(rows.raDeg, rows.decDeg);
const places: [number, number][] = [
  [0, 0],
  [180, 0],
  [179.99, 30],
  [359.9999, 0],
  [12, 90],
  [200, 89.8],
  [77, -90],
  [300, -45],
];

describe('a cone', () => {
  it.each([90, 3600, 72_000, 324_000, 640_000, 648_000])(
    'holds the rows of the pair search within %d arcsec',
    (radius) => {
      const grid = buildZoneGrid(rows.raDeg, rows.decDeg);
      let total = 0;
      for (const [ra, dec] of places) {
        const one = { raDeg: Float64Array.of(ra), decDeg: Float64Array.of(dec), radiusArcsec: Float64Array.of(radius) };
        const pairs = pairSearch(grid, one);
        const cone = coneSearch(index, ra, dec, radius);
        expect([...cone.row]).toEqual([...pairs.row]);
        expect([...cone.separationArcsec]).toEqual([...pairs.separationArcsec]);
        total += cone.row.length;
      }
      expect(total).toBeGreaterThan(15);
    },
  );
  it('is the same from an index read by another thread', () => {
    const shared = buildConeIndex(rows.raDeg, rows.decDeg, SharedArrayBuffer);
    const other = coneIndexFrom(shared.tree.data, rows.raDeg, rows.decDeg);
    expect(coneSearch(other, 180, 0, 72_000)).toEqual(coneSearch(index, 180, 0, 72_000));
  });
  it('refuses a position off the sky and a senseless radius', () => {
    expect(() => coneSearch(index, NaN, 0, 1)).toThrow(/no position/);
    expect(() => coneSearch(index, 0, 0, -1)).toThrow(/search radius/);
    expect(() => buildConeIndex(Float64Array.of(1), Float64Array.of(91))).toThrow(/row 0/);
  });
});

describe('the nearest rows', () => {
  it.each([1, 5, 25, 500])('are the first %d of all rows by separation, then row', (k) => {
    for (const [ra, dec] of places) {
      const all = Array.from(rows.raDeg, (rowRa, row) => ({
        row,
        apart: testSeparation(ra, dec, rowRa, rows.decDeg[row]!),
      })).sort((a, b) => a.apart - b.apart || a.row - b.row);
      const found = nearestRows(index, ra, dec, k);
      expect(found.row).toHaveLength(k);
      for (let i = 0; i < k; i++) expect(found.separationArcsec[i]!).toBeCloseTo(all[i]!.apart, 6);
    }
  });
  it('break a tie by the order of the catalogue', () => {
    expect([...nearestRows(index, 359.9999, 0, 3).row]).toEqual([3300, 3301, 3302]);
  });
  it('are all there are, where fewer exist', () => {
    const two = buildConeIndex(Float64Array.of(0, 180), Float64Array.of(0, 0));
    expect(nearestRows(two, 1, 0, 5)).toEqual({
      row: Uint32Array.of(0, 1),
      separationArcsec: Float64Array.of(3600, 179 * 3600),
    });
    const none = buildConeIndex(new Float64Array(0), new Float64Array(0));
    expect(nearestRows(none, 1, 0, 5).row).toHaveLength(0);
    expect(coneSearch(none, 1, 0, 5).row).toHaveLength(0);
  });
});
