import { buildGridOf } from './build-zone-grid.ts';
import type { Numbers } from './sky-position.ts';
import { type Memory, plainMemory } from './memory.ts';
import type { ZoneGrid } from './zone-grid.ts';

/** A grid of those rows of a catalogue that have a velocity. */
export interface VelocityGrid extends ZoneGrid {
  /** optical barycentric cz of the row in each slot, km/s */
  czKms: Numbers;
}

/** Adds the velocities to a grid built with them as `only`. */
export function withVelocities(grid: ZoneGrid, czKms: Numbers, memory: Memory): VelocityGrid {
  const ordered = new Float64Array(memory(8 * grid.rows));
  for (let slot = 0; slot < grid.rows; slot++) ordered[slot] = czKms[grid.row[slot]!]!;
  return { ...grid, czKms: ordered };
}

/**
 * Builds the grid for the neighbour search. Rows without a velocity (NaN, or not finite) can be nobody's neighbour and
 * are left out, positions unread.
 *
 * @param czKms optical barycentric velocities, km/s, NaN where unknown
 * @throws {DomainError} if the columns differ in length, or a row with a velocity has no position
 */
export function buildVelocityGrid(
  raDeg: Numbers,
  decDeg: Numbers,
  czKms: Numbers,
  memory: Memory = plainMemory,
): VelocityGrid {
  return withVelocities(buildGridOf({ raDeg, decDeg, only: czKms }, memory), czKms, memory);
}
