import { sortHeavyCells } from './heavy-cells.ts';
import type { Numbers } from './sky-position.ts';
import { emptyGrid, type Memory, plainMemory, type ZoneGrid } from './zone-grid.ts';
import { countRows, declinationRange, placeRows, startsOf } from './zone-grid-steps.ts';
import { layoutZones } from './zone-layout.ts';

/**
 * Builds the grid of a catalogue in this thread. Time and memory are linear in the rows: 20 bytes a row to keep, 4 more
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
  const cells = new Uint32Array(rows);
  const counts = new Uint32Array(grid.starts.length - 1);
  countRows(grid.layout, raDeg, decDeg, 0, rows, cells, counts);
  const [next] = startsOf(grid.starts, [counts]);
  placeRows(grid, raDeg, decDeg, 0, rows, cells, next!);
  sortHeavyCells(grid, 0, counts.length);
  return grid;
}
