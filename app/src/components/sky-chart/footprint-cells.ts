import { cellBoundary, cellSide } from '@eremite/shared/science/sky/healpix';
import { Moc } from '@eremite/shared/science/sky/moc';

const RAD = Math.PI / 180;
const MOST_CELLS = 4000;
const FINEST_DRAWN = 10;
const COARSEST_DRAWN = 4;

export interface FootprintCell {
  corners: { raDeg: number; decDeg: number }[];
}

/**
 * Cells of a region, coarsened until few enough to draw, and their side in degrees.
 * @param text MOC in ASCII
 */
export function footprintCells(text: string): { cells: FootprintCell[]; sideDeg: number } {
  const region = Moc.parse(text);
  const cells: FootprintCell[] = [];
  const order = (() => {
    let at = Math.min(region.order, FINEST_DRAWN);
    while (at > COARSEST_DRAWN && region.size / 4 ** (region.order - at) > MOST_CELLS) at--;
    // Large cells have curved edges: they are drawn as the smaller ones they are made of.
    return Math.max(at, COARSEST_DRAWN);
  })();
  const width = 4 ** (region.order - order);
  const seen = new Set<number>();
  for (let i = 0; i < region.ranges.length; i += 2) {
    const last = Math.ceil(region.ranges[i + 1]! / width);
    for (let cell = Math.floor(region.ranges[i]! / width); cell < last && seen.size < 4 * MOST_CELLS; cell++) {
      if (seen.has(cell)) continue;
      seen.add(cell);
      cells.push({
        corners: cellBoundary(order, cell, 1).map(({ lon, lat }) => ({ raDeg: lon / RAD, decDeg: lat / RAD })),
      });
    }
  }
  return { cells, sideDeg: cellSide(order) / RAD };
}
