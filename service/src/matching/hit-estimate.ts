import type { SearchPositions } from './search-positions.ts';
import { separationArcsec } from './separation-arcsec.ts';
import { findBox, makeSkyBox } from './sky-box.ts';
import { wrapRaDeg } from './sky-position.ts';
import type { ZoneGrid } from './zone-grid.ts';

/** Positions and, for each, rows that are tried: a million distances at most, 0.1 s. */
const POSITIONS_TRIED = 256;
const ROWS_TRIED = 4096;

/**
 * Rows in the boxes of some positions: an upper bound of the pairs, found from the cells alone.
 *
 * @param order indices of the positions counted
 */
export function candidateRows(grid: ZoneGrid, where: SearchPositions, order: Uint32Array): number {
  const box = makeSkyBox();
  let rows = 0;
  for (const p of order) {
    findBox(grid, box, wrapRaDeg(where.raDeg[p]!), where.decDeg[p]!, where.radiusArcsec[p]! / 3600);
    for (let r = 0; r < box.ranges; r++) rows += box.slots[2 * r + 1]! - box.slots[2 * r]!;
  }
  return rows;
}

/**
 * Pairs a search would give, estimated from rows at even steps round positions at even steps: nothing is drawn at
 * random, so the same search is always refused or always let through.
 */
export function estimateHits(grid: ZoneGrid, where: SearchPositions, order: Uint32Array): number {
  const box = makeSkyBox();
  const step = Math.max(1, Math.ceil(order.length / POSITIONS_TRIED));
  let pairs = 0;
  let tried = 0;
  for (let i = 0; i < order.length; i += step) {
    const p = order[i]!;
    const ra = wrapRaDeg(where.raDeg[p]!);
    const dec = where.decDeg[p]!;
    const radius = where.radiusArcsec[p]!;
    const rows = candidateRows(grid, where, Uint32Array.of(p));
    const stride = Math.max(1, Math.ceil(rows / ROWS_TRIED));
    findBox(grid, box, ra, dec, radius / 3600);
    for (let r = 0; r < box.ranges; r++) {
      const end = box.slots[2 * r + 1]!;
      const from = Math.ceil(box.slots[2 * r]! / stride) * stride;
      for (let slot = from; slot < end; slot += stride) {
        const row = grid.row[slot]!;
        const apart = separationArcsec(ra, dec, wrapRaDeg(grid.raDeg[row]!), grid.decDeg[row]!);
        if (apart <= radius) pairs += stride;
      }
    }
    tried++;
  }
  return tried === 0 ? 0 : Math.round((pairs / tried) * order.length);
}
