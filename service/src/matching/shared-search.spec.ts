import { describe, expect, it } from 'vitest';
import { buildZoneGrid } from './build-zone-grid.ts';
import { HitLimitError } from './hit-limit.ts';
import { runTask, type TaskRunner } from './matching-task.ts';
import { neighbourSearch } from './neighbour-search.ts';
import { pairSearch } from './pair-search.ts';
import { buildSharedGrid, buildSharedVelocityGrid, sharedNeighbourSearch, sharedPairSearch } from './shared-search.ts';
import { evenSky, near } from './testing/brute-force.ts';
import { buildVelocityGrid } from './velocity-grid.ts';

/** Runs tasks here, the later asked the sooner done: nothing may hang on which range is ready first. */
const backwards: TaskRunner = (name, task) =>
  new Promise((resolve) => setImmediate(() => resolve(runTask(name, task))));

const crowd = near({ raDeg: new Float64Array(500).fill(150), decDeg: new Float64Array(500).fill(2) }, 0.01, 92);
const even = evenSky(3000, 91);
const rows = {
  raDeg: Float64Array.of(...even.raDeg, ...crowd.raDeg),
  decDeg: Float64Array.of(...even.decDeg, ...crowd.decDeg),
};
const positions = { ...evenSky(101, 93), radiusArcsec: new Float64Array(101).fill(30_000) };

describe('searching with several threads', () => {
  it.each([1, 2, 3, 7])('builds the same grid as one thread: %d ranges', async (threads) => {
    const grid = await buildSharedGrid(backwards, threads, rows);
    const alone = buildZoneGrid(rows.raDeg, rows.decDeg);
    expect([...grid.starts]).toEqual([...alone.starts]);
    expect([...grid.row]).toEqual([...alone.row]);
  });
  it.each([1, 2, 5])('finds the same pairs and neighbours as one thread: %d ranges', async (threads) => {
    const grid = buildZoneGrid(rows.raDeg, rows.decDeg);
    const alone = pairSearch(grid, positions);
    expect(alone.row.length).toBeGreaterThan(1000);
    expect(await sharedPairSearch(backwards, threads, grid, positions)).toEqual(alone);
    const cz = rows.raDeg.map((ra, i) => (i % 5 ? 3000 + ra : NaN));
    const moving = buildVelocityGrid(rows.raDeg, rows.decDeg, cz);
    const source = { ...rows, only: cz };
    expect(await buildSharedVelocityGrid(backwards, threads, source)).toMatchObject({
      row: moving.row,
      czKms: moving.czKms,
    });
    const queries = {
      ...positions,
      czKms: new Float64Array(101).fill(3100),
      angularRadiusDeg: new Float64Array(101).fill(10),
      windowKms: new Float64Array(101).fill(100),
    };
    const neighbours = neighbourSearch(moving, queries);
    expect(neighbours.row.length).toBeGreaterThan(300);
    expect(await sharedNeighbourSearch(backwards, threads, moving, queries)).toEqual(neighbours);
  });
  it('holds with no rows and no positions', async () => {
    const none = new Float64Array(0);
    const grid = await buildSharedGrid(backwards, 2, { raDeg: none, decDeg: none });
    expect((await sharedPairSearch(backwards, 2, grid, positions)).row).toHaveLength(0);
    const nowhere = { raDeg: none, decDeg: none, radiusArcsec: none };
    expect((await sharedPairSearch(backwards, 2, grid, nowhere)).row).toHaveLength(0);
  });
  it('refuses when the ranges together find too much', async () => {
    const grid = buildZoneGrid(rows.raDeg, rows.decDeg);
    const total = pairSearch(grid, positions).row.length;
    await expect(sharedPairSearch(backwards, 2, grid, positions, total - 1)).rejects.toThrow(HitLimitError);
    expect((await sharedPairSearch(backwards, 2, grid, positions, total)).row).toHaveLength(total);
  });
});
