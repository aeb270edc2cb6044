import { buildZoneGrid } from '@eremite/service/matching/build-zone-grid.ts';
import { neighbourSearch } from '@eremite/service/matching/neighbour-search.ts';
import { pairSearch } from '@eremite/service/matching/pair-search.ts';
import { seeded } from '@eremite/service/matching/testing/brute-force.ts';
import { buildVelocityGrid } from '@eremite/service/matching/velocity-grid.ts';
import { inTileOrder, type Shared, shared, sky } from './sky-data.ts';

/** One timed repeat: seconds of index and search, and the pairs as position, row, position, row... by position. */
export interface Timed {
  indexSeconds: number;
  searchSeconds: number;
  first: Uint32Array;
  second: Uint32Array;
}

/** A line of the table. */
export interface BenchCase {
  title: string;
  /** the program it is compared with, its arguments, and the least ratio aimed at */
  script: string;
  argument: number;
  aim: number;
  columns: Record<string, Shared>;
  once: () => Timed;
}

function pairCase(title: string, rows: number, aim: number, decLowDeg = -90, tiles = false): BenchCase {
  const order = tiles ? inTileOrder : <T>(points: T): T => points;
  const at = order(sky(100_000, 1, decLowDeg));
  const row = order(sky(rows, 2, decLowDeg));
  const positions = { ...at, radiusArcsec: shared(100_000).fill(90) };
  return {
    title,
    script: 'astropy_pairs.py',
    argument: 90,
    aim,
    columns: { ...at, rowRaDeg: row.raDeg, rowDecDeg: row.decDeg },
    once: () => {
      const start = performance.now();
      const grid = buildZoneGrid(row.raDeg, row.decDeg);
      const built = performance.now();
      const pairs = pairSearch(grid, positions);
      const done = performance.now();
      return {
        indexSeconds: (built - start) / 1000,
        searchSeconds: (done - built) / 1000,
        first: pairs.position,
        second: pairs.row,
      };
    },
  };
}

/** 1 Mpc and 500 km/s round 30,000 detections at 1000 to 15000 km/s, Hubble constant 70. */
function neighbourCase(): BenchCase {
  const count = 30_000;
  const random = seeded(3);
  const at = sky(count, 4);
  const rows = sky(1_000_000, 5);
  const czKms = shared(count);
  for (let i = 0; i < count; i++) czKms[i] = 1000 + 14_000 * random();
  const angularRadiusDeg = shared(count);
  for (let i = 0; i < count; i++) angularRadiusDeg[i] = (180 / Math.PI) * (70 / czKms[i]!);
  const rowCzKms = shared(1_000_000);
  for (let i = 0; i < 1_000_000; i++) rowCzKms[i] = i % 10 < 3 ? 500 + 19_500 * random() : NaN;
  const queries = { ...at, czKms, angularRadiusDeg, windowKms: shared(count).fill(500) };
  return {
    title: 'neighbours, 3e4 detections, 3e5 of 1e6 rows with cz',
    script: 'scipy_neighbours.py',
    argument: 500,
    aim: 4,
    columns: { ...at, czKms, angularRadiusDeg, rowRaDeg: rows.raDeg, rowDecDeg: rows.decDeg, rowCzKms },
    once: () => {
      const start = performance.now();
      const grid = buildVelocityGrid(rows.raDeg, rows.decDeg, rowCzKms);
      const built = performance.now();
      const found = neighbourSearch(grid, queries);
      const done = performance.now();
      return {
        indexSeconds: (built - start) / 1000,
        searchSeconds: (done - built) / 1000,
        first: found.detection,
        second: found.row,
      };
    },
  };
}

/** The lines by name; each is made only when it is run. */
export const BENCH_CASES: Record<string, () => BenchCase> = {
  'pairs-1e6': () => pairCase('pairs, 1e5 to 1e6 rows, whole sky', 1e6, 2),
  'pairs-1e7': () => pairCase('pairs, 1e5 to 1e7 rows, whole sky', 1e7, 4),
  'pairs-1e7-tiles': () => pairCase('the same in tile order', 1e7, 4, -90, true),
  'pairs-pole': () => pairCase('pairs, 1e5 to 1e6 rows, 10 deg round pole', 1e6, 2, 80),
  neighbours: neighbourCase,
};
