import { checkPosition, type Numbers, wrapRaDeg } from './sky-position.ts';
import type { ZoneGrid } from './zone-grid.ts';
import { cellOf, zoneOf } from './zone-layout.ts';

/**
 * The positions of a range in the order of the grid's cells (positions of nearby cells by index), so that a search walks through memory instead of jumping.
 *
 * @returns indices of the positions in [from, to)
 * @throws {DomainError} if one of them is not on the sky
 */
export function skyOrder(grid: ZoneGrid, raDeg: Numbers, decDeg: Numbers, from: number, to: number): Uint32Array {
  const count = to - from;
  const cells = grid.layout.cellsBefore[grid.layout.zones]!;
  // Neighbouring cells share a bucket where there are more cells than positions.
  const width = Math.max(1, Math.ceil(cells / (count + 1)));
  const bucketOf = new Uint32Array(count);
  const next = new Uint32Array(Math.ceil(cells / width) + 1);
  for (let i = 0; i < count; i++) {
    const ra = raDeg[from + i]!;
    const dec = decDeg[from + i]!;
    checkPosition('position', from + i, ra, dec);
    const bucket = Math.floor(cellOf(grid.layout, zoneOf(grid.layout, dec), wrapRaDeg(ra)) / width);
    bucketOf[i] = bucket;
    next[bucket + 1]!++;
  }
  for (let bucket = 1; bucket < next.length; bucket++) next[bucket]! += next[bucket - 1]!;
  const order = new Uint32Array(count);
  for (let i = 0; i < count; i++) order[next[bucketOf[i]!]!++] = from + i;
  return order;
}
