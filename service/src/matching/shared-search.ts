import { DEFAULT_HIT_LIMIT, HitLimitError } from './hit-limit.ts';
import type { TaskRunner } from './matching-task.ts';
import type { NeighbourQueries, Neighbours } from './neighbour-search.ts';
import type { Pairs } from './pair-search.ts';
import type { SearchPositions } from './search-positions.ts';
import type { Numbers } from './sky-position.ts';
import { sharedMemory } from './memory.ts';
import { emptyGrid, type GridSource, type ZoneGrid } from './zone-grid.ts';
import { blocksOf, blockStarts } from './zone-grid-steps.ts';
import { type VelocityGrid, withVelocities } from './velocity-grid.ts';
import { layoutZones } from './zone-layout.ts';

/** [0, count) in so many nearly equal ranges; the empty ones are left out. */
function split(count: number, parts: number): { from: number; to: number }[] {
  const edge = (part: number) => Math.floor((count * part) / parts);
  return Array.from({ length: parts }, (_, part) => ({ from: edge(part), to: edge(part + 1) })).filter(
    ({ from, to }) => from < to,
  );
}

/**
 * Builds a grid with several threads, to the same bytes as `buildZoneGrid`. The input must lie in SharedArrayBuffers,
 * or it is copied to every thread.
 *
 * @param run where the steps are run
 * @param threads ranges of rows worked on side by side
 */
export async function buildSharedGrid(run: TaskRunner, threads: number, source: GridSource): Promise<ZoneGrid> {
  const length = source.raDeg.length;
  const ranges = split(length, threads);
  const measured = await Promise.all(ranges.map((range) => run('measureRows', { source, ...range })));
  const rows = measured.reduce((sum, range) => sum + range.rows, 0);
  const low = measured.reduce((least, range) => Math.min(least, range.low), 90);
  const high = measured.reduce((most, range) => Math.max(most, range.high), -90);
  const grid = emptyGrid(layoutZones(rows, low, high), rows, source, sharedMemory);
  const { layout } = grid;
  const counts = await Promise.all(ranges.map((range) => run('countBlocks', { layout, source, ...range })));
  const { starts, next } = blockStarts(counts, blocksOf(layout));
  const spread = new Uint32Array(sharedMemory(4 * rows));
  await Promise.all(ranges.map((range, i) => run('spreadRows', { layout, source, ...range, next: next[i]!, spread })));
  // Blocks hold unequal numbers of rows: more ranges than threads even that out.
  await Promise.all(
    split(blocksOf(layout), 8 * threads).map((range) => run('placeBlocks', { grid, spread, starts, ...range })),
  );
  return grid;
}

/** `buildVelocityGrid` with several threads. */
export async function buildSharedVelocityGrid(
  run: TaskRunner,
  threads: number,
  source: GridSource & { only: Numbers },
): Promise<VelocityGrid> {
  return withVelocities(await buildSharedGrid(run, threads, source), source.only, sharedMemory);
}

const joinNumbers = <T extends Uint32Array | Float64Array>(parts: T[]): T => {
  const first = parts[0]!;
  if (parts.length === 1) return first;
  const total = parts.reduce((sum, part) => sum + part.length, 0);
  const joined = new (first.constructor as new (length: number) => T)(total);
  let at = 0;
  for (const part of parts) {
    joined.set(part, at);
    at += part.length;
  }
  return joined;
};

/** Joins the answers of ranges in their order; refuses if together they are over the limit. */
function joinParts<T extends object>(parts: T[], limit: number): T {
  const names = Object.keys(parts[0]!) as (keyof T)[];
  const entries = names.map((name) => [name, joinNumbers(parts.map((part) => part[name] as Float64Array))] as const);
  const count = entries[0]![1].length;
  if (count > limit) throw new HitLimitError(limit, count);
  return Object.fromEntries(entries) as T;
}

/** `pairSearch` with several threads: the same pairs in the same order. The grid must lie in shared memory. */
export async function sharedPairSearch(
  run: TaskRunner,
  threads: number,
  grid: ZoneGrid,
  positions: SearchPositions,
  limit = DEFAULT_HIT_LIMIT,
): Promise<Pairs> {
  const ranges = split(positions.raDeg.length, threads);
  if (ranges.length === 0) ranges.push({ from: 0, to: 0 });
  const parts = ranges.map((range) => run('pairSearch', { grid, positions, range: { ...range, limit } }));
  return joinParts(await Promise.all(parts), limit);
}

/** `neighbourSearch` with several threads: the same neighbours in the same order. */
export async function sharedNeighbourSearch(
  run: TaskRunner,
  threads: number,
  grid: VelocityGrid,
  queries: NeighbourQueries,
  limit = DEFAULT_HIT_LIMIT,
): Promise<Neighbours> {
  const ranges = split(queries.raDeg.length, threads);
  if (ranges.length === 0) ranges.push({ from: 0, to: 0 });
  const parts = ranges.map((range) => run('neighbourSearch', { grid, queries, range: { ...range, limit } }));
  return joinParts(await Promise.all(parts), limit);
}
