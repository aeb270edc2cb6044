import type { ZoneGrid } from './zone-grid.ts';

/** Cells with more rows than this are kept sorted by declination and searched by halving. */
export const HEAVY_CELL = 64;

/**
 * Sorts the rows of every heavy cell of a range of cells by declination, then by row, so that a small radius in a
 * crowded field of a wide catalogue does not have to look at the whole crowd.
 *
 * @param end slot after the last row of the range: the start of the next cell may not be known yet
 */
export function sortHeavyCells(grid: ZoneGrid, end: number, fromCell: number, toCell: number): void {
  const { starts, decDeg, row } = grid;
  for (let cell = fromCell; cell < toCell; cell++) {
    const from = starts[cell]!;
    const to = cell + 1 < toCell ? starts[cell + 1]! : end;
    if (to - from > HEAVY_CELL) row.subarray(from, to).sort((a, b) => decDeg[a]! - decDeg[b]! || a - b);
  }
}

/** @returns the first slot in [from, to) of a heavy cell whose declination is not below (or `above`: is above) the limit */
export function slotAt(grid: ZoneGrid, from: number, to: number, limitDeg: number, above: boolean): number {
  const { row, decDeg } = grid;
  while (from < to) {
    const middle = (from + to) >>> 1;
    const dec = decDeg[row[middle]!]!;
    if (above ? dec <= limitDeg : dec < limitDeg) from = middle + 1;
    else to = middle;
  }
  return from;
}
