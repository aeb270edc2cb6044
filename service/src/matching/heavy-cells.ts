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
  const { starts, coords, row } = grid;
  for (let cell = fromCell; cell < toCell; cell++) {
    const from = starts[cell]!;
    const to = cell + 1 < toCell ? starts[cell + 1]! : end;
    if (to - from <= HEAVY_CELL) continue;
    const order = Uint32Array.from({ length: to - from }, (_, i) => i);
    const some = coords.slice(2 * from, 2 * to);
    const rows = row.slice(from, to);
    order.sort((a, b) => some[2 * a + 1]! - some[2 * b + 1]! || a - b);
    for (let i = 0; i < order.length; i++) {
      coords[2 * (from + i)] = some[2 * order[i]!]!;
      coords[2 * (from + i) + 1] = some[2 * order[i]! + 1]!;
      row[from + i] = rows[order[i]!]!;
    }
  }
}

/** @returns the first slot in [from, to) of a heavy cell whose declination is not below (or `above`: is above) the limit */
export function slotAt(grid: ZoneGrid, from: number, to: number, decDeg: number, above: boolean): number {
  const { coords } = grid;
  while (from < to) {
    const middle = (from + to) >>> 1;
    const dec = coords[2 * middle + 1]!;
    if (above ? dec <= decDeg : dec < decDeg) from = middle + 1;
    else to = middle;
  }
  return from;
}
