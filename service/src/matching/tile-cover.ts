import { cellCentre, cellOf, cellRadius, cellSide } from '@eremite/shared/science/sky/healpix';
import { conesCells } from '@eremite/shared/science/sky/healpix-cone';
import { separation } from '@eremite/shared/science/sky/separation';

/** Cells that may be needed from anywhere in one cell, with their centres. */
interface Surroundings {
  cells: number[];
  lon: Float64Array;
  lat: Float64Array;
}

/**
 * Makes a function that gives the cells touched by a cone, as `conesCells` does, for many cones: the cells round each
 * cell are found once and only sifted for each cone: three times faster with six detections a cell.
 *
 * @param order HEALPix order, 0 to 12
 * @returns (lon, lat, radius), radians -> nested cells, ascending; a cell that only just misses the cone may be among them
 */
export function tileCover(order: number): (lon: number, lat: number, radius: number) => number[] {
  const known = new Map<string, Surroundings>();
  const reach = cellRadius(order);
  const least = cellSide(order) / 8;
  const surroundings = (cell: number, radius: number): Surroundings => {
    const key = `${cell} ${radius}`;
    const found = known.get(key);
    if (found) return found;
    const centre = cellCentre(order, cell);
    const cells = conesCells(order, centre.lon, centre.lat, Math.min(Math.PI, radius + reach * (1 + 1e-9)));
    const centres = cells.map((near) => cellCentre(order, near));
    const made = {
      cells,
      lon: Float64Array.from(centres, ({ lon }) => lon),
      lat: Float64Array.from(centres, ({ lat }) => lat),
    };
    known.set(key, made);
    return made;
  };
  return (lon, lat, radius) => {
    // Few different radii, each a power of two of the least, so that cells share their surroundings.
    const rounded = least * 2 ** Math.max(0, Math.ceil(Math.log2(radius / least)));
    const { cells, lon: lons, lat: lats } = surroundings(cellOf(order, lon, lat), rounded);
    const limit = radius + reach + 1e-12;
    return cells.filter((_, i) => separation(lon, lat, lons[i]!, lats[i]!) <= limit);
  };
}
