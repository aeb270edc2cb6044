import { type NeighbourQueries, type Neighbours, neighbourSearch } from './neighbour-search.ts';
import { type Pairs, pairSearch } from './pair-search.ts';
import type { SearchPositions } from './search-positions.ts';
import type { SearchRange } from './search-range.ts';
import type { VelocityGrid } from './velocity-grid.ts';
import type { GridSource, ZoneGrid } from './zone-grid.ts';
import { countBlocks, measureRows, placeBlocks, type RowsMeasured, spreadRows } from './zone-grid-steps.ts';
import type { ZoneLayout } from './zone-layout.ts';

interface RowRange {
  source: GridSource;
  from: number;
  to: number;
}

/** What a thread can be asked, and what it answers. Grids and scratch arrays lie in shared memory and are written there. */
export interface MatchingTasks {
  measureRows: { task: RowRange; result: RowsMeasured };
  countBlocks: { task: RowRange & { layout: ZoneLayout }; result: Uint32Array };
  spreadRows: { task: RowRange & { layout: ZoneLayout; next: Uint32Array; spread: Uint32Array }; result: void };
  placeBlocks: {
    task: { grid: ZoneGrid; spread: Uint32Array; starts: Uint32Array; from: number; to: number };
    result: void;
  };
  pairSearch: { task: { grid: ZoneGrid; positions: SearchPositions; range: SearchRange }; result: Pairs };
  neighbourSearch: { task: { grid: VelocityGrid; queries: NeighbourQueries; range: SearchRange }; result: Neighbours };
}
export type TaskName = keyof MatchingTasks;

/** Runs a task somewhere: in a pool of threads, or in this thread. */
export type TaskRunner = <N extends TaskName>(
  name: N,
  task: MatchingTasks[N]['task'],
) => Promise<MatchingTasks[N]['result']>;

const kernels: { [N in TaskName]: (task: MatchingTasks[N]['task']) => MatchingTasks[N]['result'] } = {
  measureRows: (t) => measureRows(t.source, t.from, t.to),
  countBlocks: (t) => countBlocks(t.layout, t.source, t.from, t.to),
  spreadRows: (t) => spreadRows(t.layout, t.source, t.from, t.to, t.next, t.spread),
  placeBlocks: (t) => placeBlocks(t.grid, t.spread, t.starts, t.from, t.to),
  pairSearch: (t) => pairSearch(t.grid, t.positions, t.range),
  neighbourSearch: (t) => neighbourSearch(t.grid, t.queries, t.range),
};

/** Runs a task in this thread, at once. */
export function runTask<N extends TaskName>(name: N, task: MatchingTasks[N]['task']): MatchingTasks[N]['result'] {
  return kernels[name](task);
}
