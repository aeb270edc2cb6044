import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { buildZoneGrid } from './build-zone-grid.ts';
import { HitLimitError } from './hit-limit.ts';
import { pairSearch, type Pairs } from './pair-search.ts';
import { separationArcsec } from './separation-arcsec.ts';
import { brutePairs, evenSky, near, seeded, type SkyPoints, testSeparation } from './testing/brute-force.ts';
import { sharedMemory } from './memory.ts';

vi.setConfig({ testTimeout: 30_000 }); // all against all is slow on a busy machine

const join = (...parts: SkyPoints[]): SkyPoints => ({
  raDeg: Float64Array.from(parts.flatMap((part) => [...part.raDeg])),
  decDeg: Float64Array.from(parts.flatMap((part) => [...part.decDeg])),
});
const points = (...list: [number, number][]): SkyPoints => ({
  raDeg: Float64Array.from(list, ([ra]) => ra),
  decDeg: Float64Array.from(list, ([, dec]) => dec),
});
const withRadius = (at: SkyPoints, radiusArcsec: number | Float64Array) => ({
  ...at,
  radiusArcsec: typeof radiusArcsec === 'number' ? new Float64Array(at.raDeg.length).fill(radiusArcsec) : radiusArcsec,
});
const search = (at: SkyPoints, rows: SkyPoints, radius: number | Float64Array): Pairs =>
  pairSearch(buildZoneGrid(rows.raDeg, rows.decDeg), withRadius(at, radius));
const asSet = ({ position, row }: Pairs): string[] => Array.from(position, (p, i) => `${p} ${row[i]!}`).sort();
/** Compares with all against all; asks for a few pairs at least, for an empty answer proves nothing. */
function expectExact(at: SkyPoints, rows: SkyPoints, radius: number | Float64Array, atLeast = 20): void {
  const expected = brutePairs(withRadius(at, radius), rows).sort();
  expect(expected.length).toBeGreaterThanOrEqual(atLeast);
  expect(asSet(search(at, rows, radius))).toEqual(expected);
}

describe('pair search finds exactly the pairs of all against all', () => {
  it('on the whole sky, from 90 arcsec to 10 degrees', () => {
    const rows = evenSky(3000, 1);
    const at = join(evenSky(150, 2), near(evenSky(150, 1), 0.02, 3));
    for (const [radius, atLeast] of [
      [90, 60],
      [600, 100],
      [36_000, 5000],
    ] as const) {
      expectExact(at, rows, radius, atLeast);
    }
  });
  it('with radii of 90, 120 and 180 degrees', () => {
    for (const radius of [90, 120, 179.9, 180]) expectExact(evenSky(20, 4), evenSky(300, 5), radius * 3600, 2000);
    expect(search(evenSky(20, 4), evenSky(300, 5), 180 * 3600).row).toHaveLength(20 * 300);
  });
  it.each([1, -1])('round the pole, sign %d, and on it', (sign) => {
    const rows = join(evenSky(600, 6, 89, 90), points([0, 90], [123, 90], [359.99, 89.9999999]));
    const at = join(evenSky(120, 7, 88.9, 90), points([0, 90], [200, 90], [77, 89.9999]));
    const turn = (p: SkyPoints) => ({ raDeg: p.raDeg, decDeg: p.decDeg.map((dec) => sign * dec) });
    for (const radius of [60, 400, 5000]) expectExact(turn(at), turn(rows), radius);
  });
  it('across right ascension 0', () => {
    const strip = (seed: number, count: number) => {
      const random = seeded(seed);
      return points(
        ...Array.from({ length: count }, (): [number, number] => {
          const ra = (random() - 0.5) * 0.4;
          return [ra < 0 ? ra + 360 : ra, (random() - 0.5) * 0.4];
        }),
        [0, 0],
      );
    };
    for (const radius of [20, 90, 900]) expectExact(strip(8, 150), strip(9, 800), radius, 5);
  });
  it('down to milliarcseconds, also beside right ascension 0 and the pole', () => {
    const places = points([10, 20], [359.9999999999, 1], [0, -45], [200, 89.9999], [0, 0]);
    const mas = 1 / 3.6e6;
    const rows = join(...Array.from({ length: 40 }, (_, i) => near(places, 3 * mas, 100 + i)));
    for (const radius of [0.0005, 0.001, 0.003]) expectExact(places, rows, radius, 3);
  });
  it('when every radius differs', () => {
    const random = seeded(10);
    const radii = Float64Array.from({ length: 200 }, () => 10 ** (1 + 4 * random()));
    expectExact(evenSky(200, 11), evenSky(2000, 12), radii);
  });
  it('in a crowd of one cell and in duplicates', () => {
    const crowd = join(evenSky(200, 13), near(points(...Array(800).fill([150, 2])), 0.01, 14));
    const same = points(...Array(300).fill([150, 2]));
    expectExact(points([150, 2], [150.001, 2]), join(crowd, same), 2, 300);
    expectExact(near(points(...Array(50).fill([150, 2])), 0.01, 15), join(crowd, same), 5, 20);
  });
  it('whatever the points (fast-check)', () => {
    const at = fc.tuple(
      fc.oneof(fc.double({ min: 0, max: 359.999, noNaN: true }), fc.constantFrom(0, 180, 359.9999999)),
      fc.oneof(fc.double({ min: -90, max: 90, noNaN: true }), fc.constantFrom(-90, 0, 90, 89.99999)),
    );
    const list = fc.array(at, { minLength: 1, maxLength: 30 });
    const radius = fc.double({ min: 0, max: 180 * 3600, noNaN: true });
    fc.assert(
      fc.property(list, list, radius, (a, b, r) => {
        const found = new Set(asSet(search(points(...a), points(...b), r)));
        for (let p = 0; p < a.length; p++) {
          for (let q = 0; q < b.length; q++) {
            const apart = testSeparation(...a[p]!, ...b[q]!);
            // The two formulas may disagree in the last bits: round values put pairs exactly on the radius.
            if (Math.abs(apart - r) > 1e-12 * r + 1e-10) expect(found.has(`${p} ${q}`)).toBe(apart < r);
          }
        }
      }),
      { numRuns: 300 },
    );
  });
  it.each([1e-6, 1e-8])('one part in %d inside and outside the radius (fast-check)', (part) => {
    const place = fc.tuple(
      fc.double({ min: 0, max: 359.99, noNaN: true }),
      fc.double({ min: -89, max: 89, noNaN: true }),
    );
    fc.assert(
      fc.property(place, fc.double({ min: -3, max: 4.5, noNaN: true }), fc.boolean(), ([ra, dec], exponent, along) => {
        const row = along
          ? ([ra, dec + (dec > 0 ? -1 : 1) * (10 ** exponent / 3600)] as const)
          : ([(ra + 10 ** exponent / 3600) % 360, dec] as const);
        const apart = testSeparation(ra, dec, ...row);
        const within = (radius: number) => search(points([ra, dec]), points([...row]), radius).row.length;
        expect([within(apart * (1 + part)), within(apart * (1 - part))]).toEqual([1, 0]);
      }),
    );
  });
});

describe('pair search', () => {
  it('takes in a row exactly at the radius and leaves out the next number below', () => {
    const radius = separationArcsec(10, 20, 10.01, 20.005);
    const within = (r: number) => search(points([10, 20]), points([10.01, 20.005]), r).row.length;
    expect([within(radius), within(radius * (1 - 2 ** -53))]).toEqual([1, 0]);
  });
  it('with radius 0 finds only what is at the very place, the pole being one place', () => {
    const rows = points([10, 20], [10, 20], [10.0000001, 20], [5, 90]);
    expect(asSet(search(points([10, 20], [99, 90]), rows, 0))).toEqual(['0 0', '0 1', '1 3']);
  });
  it('orders by position, then separation, then row, and keeps ties', () => {
    const rows = points([10.002, 0], [10.001, 0], [10.002, 0], [10, 0], [10.001, 0]);
    const { position, row, separationArcsec: apart } = search(points([50, 0], [10, 0], [10.002, 0]), rows, 30);
    expect([...position]).toEqual([1, 1, 1, 1, 1, 2, 2, 2, 2, 2]);
    expect([...row]).toEqual([3, 1, 4, 0, 2, 0, 2, 1, 4, 3]);
    expect(apart[1]).toBeCloseTo(3.6, 9);
    expect(apart[1]).toBe(apart[2]);
  });
  it('sorts a crowd of hits in the same way', () => {
    const rows = near(points(...Array(500).fill([80, 60])), 0.01, 16);
    const { row, separationArcsec: apart } = search(points([80, 60]), join(rows, rows), 60);
    expect(row).toHaveLength(1000);
    for (let i = 1; i < row.length; i++) {
      expect(apart[i - 1]! < apart[i]! || (apart[i - 1] === apart[i] && row[i - 1]! < row[i]!)).toBe(true);
    }
  });
  it('gives the same bytes for ranges put together and on shared memory', () => {
    const rows = evenSky(5000, 17);
    const at = withRadius(evenSky(300, 18), 20_000);
    const plain = pairSearch(buildZoneGrid(rows.raDeg, rows.decDeg), at);
    const grid = buildZoneGrid(rows.raDeg, rows.decDeg, sharedMemory);
    const parts = [0, 100, 101].map((from, i) => pairSearch(grid, at, { from, to: [100, 101, 300][i]! }));
    for (const name of ['position', 'row', 'separationArcsec'] as const) {
      expect(parts.flatMap((part) => [...part[name]])).toEqual([...plain[name]]);
    }
  });
  it('takes right ascensions beyond 0 to 360 as the same place', () => {
    expect(asSet(search(points([-10, 5]), points([350, 5], [710, 5], [-370, 5]), 0.001))).toHaveLength(3);
  });
  it('finds nothing in no rows and for no positions', () => {
    expect(search(points([1, 1]), points(), 3600).row).toHaveLength(0);
    expect(search(points(), points([1, 1]), 3600).row).toHaveLength(0);
  });
  it('refuses criteria that select everything, with an estimate of the count and the limit', () => {
    const rows = evenSky(2000, 19);
    const all = withRadius(evenSky(500, 20), 180 * 3600);
    const grid = buildZoneGrid(rows.raDeg, rows.decDeg);
    try {
      pairSearch(grid, all, { limit: 10_000 });
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(HitLimitError);
      expect(error).toMatchObject({ limit: 10_000, about: 1_000_000 });
    }
  });
  it('refuses what is only a little too much too, and lets through what is just at the limit', () => {
    const rows = evenSky(2000, 19);
    const at = withRadius(evenSky(500, 20), 100_000);
    const grid = buildZoneGrid(rows.raDeg, rows.decDeg);
    const count = pairSearch(grid, at).row.length;
    expect(pairSearch(grid, at, { limit: count }).row).toHaveLength(count);
    try {
      pairSearch(grid, at, { limit: count - 1 });
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(HitLimitError);
      expect(Math.abs((error as HitLimitError).about / count - 1)).toBeLessThan(0.1);
    }
  });
  it('finds all of 100,000 rows at one place, and refuses all pairs of them before they fill the memory', () => {
    const place = points(...Array<[number, number]>(100_000).fill([150, 2]));
    const grid = buildZoneGrid(place.raDeg, place.decDeg);
    const { row } = pairSearch(grid, withRadius(points([150, 2], [150, 2.001]), 0.5));
    expect(row).toHaveLength(100_000);
    expect(row.every((index, i) => index === i)).toBe(true);
    expect(() => pairSearch(grid, withRadius(place, 1))).toThrow(
      /about 1.0e\+10 pairs, more than the limit of 50000000/,
    );
  });
  it.each([-1, NaN, 648_001, Infinity])('refuses a radius of %d arcsec', (radius) => {
    expect(() => search(points([1, 1]), points([1, 1]), radius)).toThrow(/search radius/);
  });
  it('refuses rows and positions that are not on the sky, naming which', () => {
    expect(() => search(points([1, 1], [NaN, 1]), points([1, 1]), 1)).toThrow(/position 1 /);
    expect(() => search(points([1, 1]), points([1, 1], [2, 90.5]), 1)).toThrow(/row 1 .*90.5/);
  });
});
