import { footprintCells } from './footprint-cells.ts';
import type { SkyProjection } from './project-sky.ts';

type Point = [x: number, y: number];

/** Wider cells of the whole-sky map lie across its seam and would be drawn through the middle. */
const WIDEST = 2;

/**
 * Outline of a footprint on the page, as path data: the cells that the projection has a place for.
 *
 * @param moc MOC in ASCII; one that cannot be read has no outline
 * @param toPage from the projection's plane to the page
 */
export function footprintPath(moc: string, projection: SkyProjection, toPage: (point: Point) => Point): string {
  let cells;
  try {
    ({ cells } = footprintCells(moc));
  } catch {
    return '';
  }
  return cells
    .flatMap(({ corners }) => {
      const places = corners.map(({ raDeg, decDeg }) => projection.place(raDeg, decDeg));
      if (!places.every((place): place is Point => place !== undefined)) return [];
      const xs = places.map(([x]) => x);
      if (projection.kind === 'whole sky' && Math.max(...xs) - Math.min(...xs) > WIDEST) return [];
      const points = places.map((place) =>
        toPage(place)
          .map((value) => value.toFixed(1))
          .join(' '),
      );
      return [`M${points.join('L')}Z`];
    })
    .join('');
}
