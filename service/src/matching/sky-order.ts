import { checkPosition, type Numbers, wrapRaDeg } from './sky-position.ts';
import type { ZoneGrid } from './zone-grid.ts';
import { cellOf, zoneOf } from './zone-layout.ts';

/**
 * The positions of a range in the order of the grid's cells, so that a search walks through memory instead of jumping.
 *
 * @returns indices of the positions in [from, to)
 * @throws {DomainError} if one of them is not on the sky
 */
export function skyOrder(grid: ZoneGrid, raDeg: Numbers, decDeg: Numbers, from: number, to: number): Uint32Array {
  const count = to - from;
  const keys = new Float64Array(count); // cell and index in one number below 2^53: the plain sort is the fast one
  for (let i = 0; i < count; i++) {
    const ra = raDeg[from + i]!;
    const dec = decDeg[from + i]!;
    checkPosition('position', from + i, ra, dec);
    keys[i] = cellOf(grid.layout, zoneOf(grid.layout, dec), wrapRaDeg(ra)) * count + i;
  }
  keys.sort();
  return Uint32Array.from(keys, (key) => from + (key % count));
}
