import { cellCentre, cellRadius, cellSide } from './healpix.ts';
import type { Moc } from './moc.ts';
import { rangesHold } from './ranges.ts';
import { separation } from './separation.ts';

/** Cells wholly on the wanted side are not taken apart further once this small against their distance. */
const FINE_ENOUGH = 0.05;

/**
 * Distance from a direction to the nearest place that is (or is not) in a region.
 *
 * @param moc the region
 * @param lon longitude, radians
 * @param lat latitude, radians
 * @param covered true for the nearest place inside, false for the nearest place outside
 * @returns distance, radians, good to 5 per cent or one cell of the region; 0 if already there; Infinity if none
 * @throws {DomainError} for a direction out of range
 */
export function distanceToRegion(moc: Moc, lon: number, lat: number, covered: boolean): number {
  if (moc.contains(lon, lat) === covered) return 0;
  const wanted = covered ? 'all' : 'none';
  const half = cellSide(moc.order) / 2;
  const reaches = Array.from({ length: moc.order + 1 }, (_, order) => cellRadius(order));
  let best = Infinity;

  const nearestFirst = (order: number, cells: readonly number[]) =>
    cells
      .map((cell) => {
        const centre = cellCentre(order, cell);
        return { cell, distance: separation(lon, lat, centre.lon, centre.lat) };
      })
      .sort((a, b) => a.distance - b.distance);

  const visit = (order: number, cell: number, distance: number): void => {
    const reach = reaches[order]!;
    if (distance - reach >= best) return;
    const width = 4 ** (moc.order - order);
    const hold = rangesHold(moc.ranges, cell * width, (cell + 1) * width);
    if (hold !== 'some' && hold !== wanted) return;
    if (order === moc.order || (hold === wanted && reach < FINE_ENOUGH * distance)) {
      best = Math.min(best, Math.max(0, distance - (order === moc.order ? half : 0.7 * reach)));
      return;
    }
    const children = [0, 1, 2, 3].map((child) => 4 * cell + child);
    for (const child of nearestFirst(order + 1, children)) visit(order + 1, child.cell, child.distance);
  };
  const bases = Array.from({ length: 12 }, (_, base) => base);
  for (const base of nearestFirst(0, bases)) visit(0, base.cell, base.distance);
  return best;
}
