import { describe, expect, it } from 'vitest';
import { buildZoneGrid } from './build-zone-grid.ts';
import { ellipseBoundingRadiusArcsec, ellipseFilter } from './ellipse-filter.ts';
import { pairSearch } from './pair-search.ts';
import { near, type SkyPoints } from './testing/brute-force.ts';

// An elliptical error: beam 45 x 15 arcsec, position angle 30 degrees, S/N 8, 1 arcsec systematic and 0.1 arcsec
// optical error. Source: covariance algebra, computed independently with numpy.
const EAST = 1.7064555465707194 ** 2;
const NORTH = 2.334090381494385 ** 2;
const BOTH = 2.1962294917798912;
const OFFSETS = [
  { east: 3, north: -4, expected: 13.434713554761196 },
  { east: 4, north: 3, expected: 5.494597873025314 },
];
const errorsFor = (count: number) => ({
  eastEast: new Float64Array(count).fill(EAST),
  northNorth: new Float64Array(count).fill(NORTH),
  eastNorth: new Float64Array(count).fill(BOTH),
});
const at = (...list: [number, number][]) => ({
  raDeg: Float64Array.from(list, ([ra]) => ra),
  decDeg: Float64Array.from(list, ([, dec]) => dec),
});

const pairs = (positions: SkyPoints, rows: SkyPoints, radius: number) =>
  pairSearch(buildZoneGrid(rows.raDeg, rows.decDeg), {
    ...positions,
    radiusArcsec: new Float64Array(positions.raDeg.length).fill(radius),
  });

describe('the error ellipse', () => {
  it.each(OFFSETS)('gives the published-formula distance of ($east, $north) arcsec', ({ east, north, expected }) => {
    for (const dec of [0, 45, -80]) {
      const here = at([100, dec]);
      const row = at([100 + east / 3600 / Math.cos((dec * Math.PI) / 180), dec + north / 3600]);
      const found = ellipseFilter(pairs(here, row, 60), here, row, errorsFor(1), 100);
      // The flat offset differs from the one on the sphere by about offset^2 tan(dec): 1e-4 of it at -80 degrees.
      expect(Math.abs(found.mahalanobis2[0]! / expected - 1)).toBeLessThan(dec === 0 ? 1e-6 : 1e-3);
    }
  });
  it('is inclusive at the limit and leaves out what lies beyond', () => {
    const here = at([100, 0]);
    const rows = at([100 + 3 / 3600, -4 / 3600], [100 + 4 / 3600, 3 / 3600]);
    const all = ellipseFilter(pairs(here, rows, 60), here, rows, errorsFor(1), 100);
    const within = (limit: number) => [...ellipseFilter(pairs(here, rows, 60), here, rows, errorsFor(1), limit).row];
    const [nearer] = [...all.mahalanobis2].sort((a, b) => a - b);
    expect(within(nearer!)).toEqual([1]);
    expect(within(nearer! * (1 - 1e-15))).toEqual([]);
    expect(all.row).toHaveLength(2);
  });
  it('lies wholly within its bounding radius, and touches it nearly', () => {
    const here = at([100, 40]);
    const rows = near(at(...Array<[number, number]>(4000).fill([100, 40])), 0.004, 31);
    const wide = ellipseFilter(pairs(here, rows, 60), here, rows, errorsFor(1), 9.2103);
    const bound = ellipseBoundingRadiusArcsec(EAST, NORTH, BOTH, 9.2103);
    const farthest = Math.max(...wide.separationArcsec);
    // sigma of the major axis 2.591519167836873: same source as above
    expect(bound).toBeCloseTo(2.591519167836873 * Math.sqrt(9.2103), 6);
    expect(farthest).toBeLessThanOrEqual(bound);
    expect(farthest).toBeGreaterThan(0.9 * bound);
    expect(ellipseFilter(pairs(here, rows, bound), here, rows, errorsFor(1), 9.2103).row).toEqual(wide.row);
  });
  it('adds the error of the row to both axes', () => {
    const here = at([100, 0]);
    const rows = at([100, 3 / 3600]);
    const errors = {
      eastEast: Float64Array.of(1),
      northNorth: Float64Array.of(1),
      eastNorth: Float64Array.of(0),
      rowSigmaArcsec: Float64Array.of(Math.sqrt(8)),
    };
    expect(ellipseFilter(pairs(here, rows, 60), here, rows, errors, 100).mahalanobis2[0]).toBeCloseTo(1, 9);
    expect(ellipseBoundingRadiusArcsec(1, 1, 0, 4, Math.sqrt(8))).toBeCloseTo(6, 6);
  });
  it('counts an offset over the pole in its direction', () => {
    const here = at([0, 90 - 1 / 3600]);
    const rows = at([180, 90 - 1 / 3600], [90, 90 - 1 / 3600]);
    const errors = { eastEast: Float64Array.of(1), northNorth: Float64Array.of(4), eastNorth: Float64Array.of(0) };
    const { row, mahalanobis2 } = ellipseFilter(pairs(here, rows, 60), here, rows, errors, 100);
    expect([...row]).toEqual([1, 0]);
    expect(mahalanobis2[0]).toBeCloseTo(1 + 1 / 4, 4);
    expect(mahalanobis2[1]).toBeCloseTo(4 / 4, 6);
  });
  it('holds a row at the very place', () => {
    const here = at([100, 0]);
    expect(ellipseFilter(pairs(here, here, 1), here, here, errorsFor(1), 0).mahalanobis2[0]).toBe(0);
  });
  it('is refused where errors are missing, zero or of no ellipse', () => {
    const here = at([100, 0]);
    for (const [ee, nn, en] of [
      [0, 0, 0],
      [NaN, 1, 0],
      [1, 1, 2],
      [-1, -1, 0],
    ] as const) {
      const errors = { eastEast: Float64Array.of(ee), northNorth: Float64Array.of(nn), eastNorth: Float64Array.of(en) };
      expect(() => ellipseFilter(pairs(here, here, 1), here, here, errors, 9)).toThrow(/no error ellipse/);
    }
    expect(() => ellipseBoundingRadiusArcsec(NaN, 1, 0, 9)).toThrow(/no ellipse/);
  });
});
