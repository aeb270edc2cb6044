import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { build } from 'vite';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { DomainError } from '@eremite/shared/science/domain-error';
import { buildZoneGrid } from './build-zone-grid.ts';
import { HitLimitError } from './hit-limit.ts';
import { type MatchingPool, openMatchingPool } from './matching-pool.ts';
import { pairSearch } from './pair-search.ts';
import { buildSharedGrid, sharedPairSearch } from './shared-search.ts';
import { evenSky } from './testing/brute-force.ts';

const inShared = (values: Float64Array): Float64Array<SharedArrayBuffer> => {
  const shared = new Float64Array(new SharedArrayBuffer(values.byteLength));
  shared.set(values);
  return shared;
};

let folder: string;
let pool: MatchingPool;
beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'matching-pool-'));
  await build({
    configFile: false,
    logLevel: 'error',
    build: {
      ssr: true,
      outDir: folder,
      rollupOptions: {
        input: { worker: join(import.meta.dirname, 'matching.worker.ts') },
        output: { entryFileNames: '[name].mjs' },
      },
    },
    ssr: { noExternal: true },
  });
  pool = openMatchingPool(join(folder, 'worker.mjs'), 2);
}, 60_000);
afterAll(async () => {
  await pool.close();
  rmSync(folder, { recursive: true });
});

describe('the pool of matching threads', () => {
  const even = evenSky(5000, 95);
  const rows = { raDeg: inShared(even.raDeg), decDeg: inShared(even.decDeg) };
  const positions = { ...evenSky(300, 96), radiusArcsec: new Float64Array(300).fill(20_000) };

  it('gives the grid and pairs of one thread', async () => {
    const grid = await buildSharedGrid(pool.runner(), 2, rows);
    const alone = buildZoneGrid(rows.raDeg, rows.decDeg);
    expect([...grid.row]).toEqual([...alone.row]);
    const pairs = await sharedPairSearch(pool.runner(), 2, grid, positions);
    expect(pairs.row.length).toBeGreaterThan(3000);
    expect(pairs).toEqual(pairSearch(alone, positions));
  });
  it('hands on refusals with their class and numbers', async () => {
    const grid = await buildSharedGrid(pool.runner(), 2, rows);
    const limited = sharedPairSearch(pool.runner(), 2, grid, positions, 10);
    await expect(limited).rejects.toBeInstanceOf(HitLimitError);
    await expect(limited).rejects.toMatchObject({ limit: 10 });
    const astray = { ...positions, radiusArcsec: new Float64Array(300).fill(-1) };
    await expect(sharedPairSearch(pool.runner(), 2, grid, astray)).rejects.toBeInstanceOf(DomainError);
  });
  it('stops within a second when told, and works on', async () => {
    const all = { ...evenSky(20_000, 97), radiusArcsec: new Float64Array(20_000).fill(648_000) };
    const grid = await buildSharedGrid(pool.runner(), 2, rows);
    const stop = new AbortController();
    const search = sharedPairSearch(pool.runner(stop.signal), 2, grid, all, 1e9).catch((error: Error) => error.name);
    await new Promise((resolve) => setTimeout(resolve, 200));
    const told = performance.now();
    stop.abort();
    expect(await search).toBe('AbortError');
    expect(performance.now() - told).toBeLessThan(1000);
    expect((await sharedPairSearch(pool.runner(), 2, grid, positions)).row.length).toBeGreaterThan(3000);
  });
});
