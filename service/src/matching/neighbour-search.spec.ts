import { describe, expect, it } from 'vitest';
import { HitLimitError } from './hit-limit.ts';
import { neighbourSearch, type Neighbours } from './neighbour-search.ts';
import { evenSky, seeded, type SkyPoints, testSeparation } from './testing/brute-force.ts';
import { buildVelocityGrid } from './velocity-grid.ts';

type Moving = SkyPoints & { czKms: Float64Array };
const moving = (list: [ra: number, dec: number, cz: number][]): Moving => ({
  raDeg: Float64Array.from(list, ([ra]) => ra),
  decDeg: Float64Array.from(list, ([, dec]) => dec),
  czKms: Float64Array.from(list, ([, , cz]) => cz),
});
const evenMoving = (count: number, seed: number, missing: number): Moving => {
  const random = seeded(seed + 1000);
  return {
    ...evenSky(count, seed),
    czKms: Float64Array.from({ length: count }, () => (random() < missing ? NaN : 1000 + 9000 * random())),
  };
};
const query = (at: Moving, radiusDeg: number, windowKms: number) => ({
  ...at,
  angularRadiusDeg: new Float64Array(at.raDeg.length).fill(radiusDeg),
  windowKms: new Float64Array(at.raDeg.length).fill(windowKms),
});
const search = (at: Moving, rows: Moving, radiusDeg: number, windowKms: number) =>
  neighbourSearch(buildVelocityGrid(rows.raDeg, rows.decDeg, rows.czKms), query(at, radiusDeg, windowKms));
const asSet = ({ detection, row }: Neighbours) => Array.from(detection, (d, i) => `${d} ${row[i]!}`).sort();

describe('neighbour search', () => {
  it.each([
    [2, 500],
    [10, 100],
    [100, 30],
  ])('finds the neighbours of all against all within %d degrees and %d km/s', (radius, window) => {
    const rows = evenMoving(4000, 21, 0.7);
    const at = evenMoving(200, 22, 0.1);
    const expected: string[] = [];
    for (let d = 0; d < 200; d++) {
      for (let r = 0; r < 4000; r++) {
        const dv = (rows.czKms[r]! - at.czKms[d]!) / (1 + at.czKms[d]! / 299792.458);
        const apart = testSeparation(at.raDeg[d]!, at.decDeg[d]!, rows.raDeg[r]!, rows.decDeg[r]!);
        if (Math.abs(dv) <= window && apart <= radius * 3600) expected.push(`${d} ${r}`);
      }
    }
    expect(expected.length).toBeGreaterThan(5);
    expect(asSet(search(at, rows, radius, window))).toEqual(expected.sort());
  });
  it('orders by detection, then separation, then row of the catalogue, and gives the signed difference', () => {
    const rows = moving([
      [10, 1, NaN],
      [10, 1, 3000],
      [10, 0.5, 2990],
      [10, 1, 3000],
      [10, 0, 3010],
    ]);
    const found = search(
      moving([
        [200, 0, 3000],
        [10, 0, 3000],
      ]),
      rows,
      1.001,
      500,
    );
    expect([...found.detection]).toEqual([1, 1, 1, 1]);
    expect([...found.row]).toEqual([4, 2, 1, 3]);
    expect(found.velocityDifferenceKms[0]).toBeCloseTo(10 / (1 + 3000 / 299792.458), 12);
    expect(found.velocityDifferenceKms[1]).toBeLessThan(0);
  });
  it('takes in a row at exactly the window and the angle', () => {
    const inside = search(
      moving([[10, 0, 0]]),
      moving([
        [10, 1, 500],
        [10, 1, -500],
      ]),
      1,
      500,
    );
    expect(asSet(inside)).toEqual(['0 0', '0 1']);
    expect(search(moving([[10, 0, 0]]), moving([[10, 1, 500.0000001]]), 1, 500).row).toHaveLength(0);
  });
  it('divides the difference by 1 + z: 530 km/s at cz 20000 is within 500', () => {
    expect(search(moving([[10, 0, 20_000]]), moving([[10, 0, 20_530]]), 1, 500).row).toHaveLength(1);
    expect(search(moving([[10, 0, 100]]), moving([[10, 0, 630]]), 1, 500).row).toHaveLength(0);
  });
  it('finds nothing where the velocity of row or detection, or the angle, is unknown', () => {
    const rows = moving([
      [10, 0, NaN],
      [10, 0, Infinity],
    ]);
    expect(search(moving([[10, 0, 3000]]), rows, 180, 1e9).row).toHaveLength(0);
    expect(search(moving([[10, 0, NaN]]), moving([[10, 0, 3000]]), 180, 1e9).row).toHaveLength(0);
    expect(search(moving([[10, 0, 3000]]), moving([[10, 0, 3000]]), NaN, 1e9).row).toHaveLength(0);
  });
  it('leaves out the rows that are the detection itself and its counterpart', () => {
    const rows = moving([
      [10, 0, 3000],
      [10, 0.1, 3000],
      [10, 0.2, 3000],
      [50, 0, 3000],
    ]);
    const at = moving([
      [10, 0, 3000],
      [50, 0, 3000],
    ]);
    const leftOut = { offsets: Uint32Array.of(0, 2, 2), rows: Uint32Array.of(2, 0) };
    const grid = buildVelocityGrid(rows.raDeg, rows.decDeg, rows.czKms);
    expect(asSet(neighbourSearch(grid, { ...query(at, 1, 500), leftOut }))).toEqual(['0 1', '1 3']);
  });
  it('gives the same for ranges put together', () => {
    const rows = evenMoving(3000, 23, 0.5);
    const at = query(evenMoving(100, 24, 0), 10, 1000);
    const grid = buildVelocityGrid(rows.raDeg, rows.decDeg, rows.czKms);
    const parts = [neighbourSearch(grid, at, { to: 33 }), neighbourSearch(grid, at, { from: 33 })];
    const whole = neighbourSearch(grid, at);
    expect(whole.row.length).toBeGreaterThan(50);
    for (const name of ['detection', 'row', 'separationArcsec', 'velocityDifferenceKms'] as const) {
      expect(parts.flatMap((part) => [...part[name]])).toEqual([...whole[name]]);
    }
  });
  it('refuses a negative or missing window, a senseless angle and a search that finds too much', () => {
    const one = moving([[10, 0, 3000]]);
    for (const window of [-1, NaN]) expect(() => search(one, one, 1, window)).toThrow(/velocity window/);
    for (const angle of [-1, 181]) expect(() => search(one, one, angle, 500)).toThrow(/search radius/);
    const grid = buildVelocityGrid(one.raDeg, one.decDeg, one.czKms);
    expect(() => neighbourSearch(grid, query(one, 1, 500), { limit: 0 })).toThrow(HitLimitError);
  });
});
