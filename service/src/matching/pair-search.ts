import { gather } from './gather.ts';
import { candidateRows, estimateHits } from './hit-estimate.ts';
import { DEFAULT_HIT_LIMIT, HitLimitError } from './hit-limit.ts';
import { Hits, orderHits } from './hits.ts';
import { checkSameLength } from './same-length.ts';
import type { SearchPositions } from './search-positions.ts';
import type { SearchRange } from './search-range.ts';
import { separationArcsec } from './separation-arcsec.ts';
import { findBox, makeSkyBox } from './sky-box.ts';
import { skyOrder } from './sky-order.ts';
import { checkRadius, wrapRaDeg } from './sky-position.ts';
import type { ZoneGrid } from './zone-grid.ts';

/** Pairs of a position and a row of the grid's input, by position, then separation, then row. */
export interface Pairs {
  /** index of the position */
  position: Uint32Array;
  /** index of the row in the input of the grid (0-based; not the data row number of its file) */
  row: Uint32Array;
  separationArcsec: Float64Array;
}

/**
 * All rows within the radius of each position, no more and no fewer: a row belongs if `separationArcsec` says it lies
 * at the radius or nearer. Anywhere on the sky; rows at one place are all found. Same input, same bytes.
 *
 * Cost: linear in positions and in the rows that lie in the boxes of right ascension and declination round them.
 *
 * @throws {DomainError} if a position or radius makes no sense
 * @throws {HitLimitError} if more than `limit` pairs would be found, with an estimate of how many
 */
export function pairSearch(grid: ZoneGrid, positions: SearchPositions, range: SearchRange = {}): Pairs {
  const { raDeg, decDeg, radiusArcsec } = positions;
  const length = checkSameLength({ raDeg, decDeg, radiusArcsec });
  const { from = 0, to = length, limit = DEFAULT_HIT_LIMIT } = range;
  const { row, raDeg: rowRaDeg, decDeg: rowDecDeg } = grid;
  const hits = new Hits();
  const box = makeSkyBox();
  const order = skyOrder(grid, raDeg, decDeg, from, to);
  for (const p of order) checkRadius('position', p, radiusArcsec[p]! / 3600);
  if (candidateRows(grid, positions, order) > limit) {
    // Most hopeless searches are refused here, before they have filled the memory.
    const about = estimateHits(grid, positions, order);
    if (about > 2 * limit) throw new HitLimitError(limit, about);
  }
  for (let i = 0; i < order.length; i++) {
    const p = order[i]!;
    const ra = wrapRaDeg(raDeg[p]!);
    const dec = decDeg[p]!;
    const radius = radiusArcsec[p]!;
    findBox(grid, box, ra, dec, radius / 3600);
    const { halfWidthDeg, decLowDeg, decHighDeg, slots } = box;
    for (let r = 0; r < box.ranges; r++) {
      const end = slots[2 * r + 1]!;
      for (let slot = slots[2 * r]!; slot < end; slot++) {
        const index = row[slot]!;
        const rowDec = rowDecDeg[index]!;
        if (rowDec < decLowDeg || rowDec > decHighDeg) continue;
        const rowRa = wrapRaDeg(rowRaDeg[index]!);
        const apart = Math.abs(rowRa - ra);
        if (apart > halfWidthDeg && 360 - apart > halfWidthDeg) continue;
        const separation = separationArcsec(ra, dec, rowRa, rowDec);
        if (separation <= radius) hits.add(p, slot, separation);
      }
    }
    if (hits.count > limit) throw new HitLimitError(limit, estimateHits(grid, positions, order));
  }
  return asPairs(grid, hits, from, to);
}

function asPairs(grid: ZoneGrid, hits: Hits, from: number, to: number): Pairs {
  const order = orderHits(hits, grid, from, to);
  return {
    position: gather(hits.query, order),
    row: gather(grid.row, gather(hits.slot, order)),
    separationArcsec: gather(hits.separationArcsec, order),
  };
}
