import type { Numbers } from './sky-position.ts';
import { emptyGrid, type Memory, plainMemory, roomForRows, type ZoneGrid } from './zone-grid.ts';
import { blocksOf, blockStarts, countBlocks, declinationRange, placeBlocks, spreadRows } from './zone-grid-steps.ts';
import { layoutZones } from './zone-layout.ts';

/**
 * Builds the grid of a catalogue in this thread. Time and memory are linear in the rows: 20 bytes a row to keep, 20 more
 * while it is built. The steps may also be run on ranges of rows side by side, to the same bytes: `zone-grid-steps.ts`.
 *
 * @param raDeg right ascensions, degrees; values outside [0, 360) are wrapped
 * @param decDeg declinations, degrees
 * @throws {DomainError} if the arrays differ in length, or a row has no position
 */
export function buildZoneGrid(raDeg: Numbers, decDeg: Numbers, memory: Memory = plainMemory): ZoneGrid {
  const rows = raDeg.length;
  const [low, high] = declinationRange(raDeg, decDeg, 0, rows);
  const grid = emptyGrid(layoutZones(rows, low, high), rows, memory);
  const { layout } = grid;
  const blocks = blocksOf(layout);
  const { starts, next } = blockStarts([countBlocks(layout, decDeg, 0, rows)], blocks);
  const spread = roomForRows(rows, plainMemory);
  spreadRows(layout, raDeg, decDeg, 0, rows, next[0]!, spread);
  placeBlocks(grid, spread, starts, 0, blocks);
  return grid;
}
