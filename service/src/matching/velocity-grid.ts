import { DomainError } from '@eremite/shared/science/domain-error';
import { buildZoneGrid } from './build-zone-grid.ts';
import type { Numbers } from './sky-position.ts';
import { type Memory, plainMemory, type ZoneGrid } from './zone-grid.ts';

/** A grid of those rows of a catalogue that have a velocity; `row` still numbers the rows of the whole catalogue. */
export interface VelocityGrid extends ZoneGrid {
  /** optical barycentric cz of each slot, km/s */
  czKms: Float64Array<ArrayBufferLike>;
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
  const rows = czKms.length;
  if (raDeg.length !== rows || decDeg.length !== rows) {
    throw new DomainError(`${raDeg.length} and ${decDeg.length} coordinates against ${rows} velocities`);
  }
  let known = 0;
  for (let i = 0; i < rows; i++) if (Number.isFinite(czKms[i])) known++;
  const kept = new Uint32Array(known);
  const ra = new Float64Array(known);
  const dec = new Float64Array(known);
  for (let i = 0, k = 0; i < rows; i++) {
    if (!Number.isFinite(czKms[i])) continue;
    kept[k] = i;
    ra[k] = raDeg[i]!;
    dec[k] = decDeg[i]!;
    k++;
  }
  const grid = buildZoneGrid(ra, dec, memory);
  const velocities = new Float64Array(memory(8 * known));
  for (let slot = 0; slot < known; slot++) {
    const row = kept[grid.row[slot]!]!;
    grid.row[slot] = row;
    velocities[slot] = czKms[row]!;
  }
  return { ...grid, czKms: velocities };
}
