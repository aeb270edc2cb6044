import { cellBoundary, cellCentre, cellSide } from '../science/sky/healpix.ts';
import { coneRanges } from '../science/sky/healpix-cone.ts';
import { Moc } from '../science/sky/moc.ts';
import { toPanel, type PanelPoint } from './panel-plane.ts';

const RAD = Math.PI / 180;
const MOST_CELLS = 6000;

/** Name and footprint of a catalogue; without a footprint nothing can be said of what it left out. */
export interface Coverage {
  /** Id of the catalogue. */
  id: string;
  name: string;
  kind: string;
  moc: string | null;
}

export interface UncoveredArea {
  id: string;
  name: string;
  kind: string;
  /** Outlines of the cells no row can come from, panel coordinates in arcsec. */
  cells: PanelPoint[][];
}

/** Order whose cells are fine enough for a circle and few enough to draw. */
function drawnOrder(finest: number, radiusRad: number): number {
  let order = Math.min(finest, 14);
  while (order > 0 && (Math.PI * radiusRad ** 2) / cellSide(order) ** 2 > MOST_CELLS) order--;
  return order;
}

/**
 * Cells within a radius of the centre that a catalogue did not observe.
 * @param radiusArcsec how far out to look, arcsec
 * @returns one entry a catalogue that leaves something out; none for a footprint that cannot be read
 */
export function uncoveredAreas(
  coverages: readonly Coverage[],
  centre: { raDeg: number; decDeg: number },
  radiusArcsec: number,
): UncoveredArea[] {
  const radius = Math.min(0.4, radiusArcsec * (RAD / 3600));
  return coverages.flatMap(({ id, name, kind, moc }) => {
    if (!moc) return [];
    let region: Moc;
    try {
      region = Moc.parse(moc);
    } catch {
      return [];
    }
    const order = drawnOrder(region.order, radius);
    const ranges = coneRanges(order, centre.raDeg * RAD, centre.decDeg * RAD, radius);
    const cells: PanelPoint[][] = [];
    for (let i = 0; i < ranges.length; i += 2) {
      for (let cell = ranges[i]!; cell < ranges[i + 1]!; cell++) {
        const middle = cellCentre(order, cell);
        if (region.contains(middle.lon, middle.lat)) continue;
        const outline = cellBoundary(order, cell, 2).map(({ lon, lat }) => toPanel(lon / RAD, lat / RAD, centre));
        if (outline.every((point) => point !== undefined)) cells.push([...outline, outline[0]!]);
      }
    }
    return cells.length > 0 ? [{ id, name, kind, cells }] : [];
  });
}
