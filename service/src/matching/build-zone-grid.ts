import type { Numbers } from './sky-position.ts';
import { type Memory, plainMemory } from './memory.ts';
import { emptyGrid, type GridSource, type ZoneGrid } from './zone-grid.ts';
import { blocksOf, blockStarts, countBlocks, measureRows, placeBlocks, spreadRows } from './zone-grid-steps.ts';
import { layoutZones } from './zone-layout.ts';

/**
 * Builds the grid of a catalogue in this thread. Time and memory are linear in the rows: 5 bytes a row to keep, 4 more
 * while it is built. `buildSharedGrid` does the same with several threads, to the same bytes.
 *
 * @param raDeg right ascensions, degrees
 * @param decDeg declinations, degrees
 * @throws {DomainError} if the arrays differ in length, or a row has no position
 */
export function buildZoneGrid(raDeg: Numbers, decDeg: Numbers, memory: Memory = plainMemory): ZoneGrid {
  return buildGridOf({ raDeg, decDeg }, memory);
}

/** `buildZoneGrid` of some of the rows. */
export function buildGridOf(source: GridSource, memory: Memory): ZoneGrid {
  const length = source.raDeg.length;
  const { low, high, rows } = measureRows(source, 0, length);
  const grid = emptyGrid(layoutZones(rows, low, high), rows, source, memory);
  const { layout } = grid;
  const blocks = blocksOf(layout);
  const { starts, next } = blockStarts([countBlocks(layout, source, 0, length)], blocks);
  const spread = new Uint32Array(rows);
  spreadRows(layout, source, 0, length, next[0]!, spread);
  placeBlocks(grid, spread, starts, 0, blocks);
  return grid;
}
