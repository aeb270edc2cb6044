import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { fromIcrs } from '@eremite/shared/science/sky/from-icrs';
import { fromTangentPlane } from '@eremite/shared/science/sky/tangent-plane';
import type { SkyImage } from './image.ts';

/** A square on the tangent plane of a position: north up, east left. */
export interface PlaneSquare {
  raDeg: number;
  decDeg: number;
  /** From the middle to an edge, arcsec. */
  halfArcsec: number;
  /** Along one side. */
  pixels: number;
}

/** Pixels of the square between places whose coordinates are computed; those between are interpolated. */
const GRID_STEP = 8;
/** Most source pixels along one side that are averaged into one. */
const MOST_AVERAGED = 64;

/**
 * Values of an image on a square of the tangent plane, rows from the north. Where the square is finer than the image each
 * of its pixels has the value of the one it lies in; where it is coarser, the mean of those it covers: surface
 * brightness stays, and no value is invented. Outside the image, and where no value is known, NaN.
 */
export function resample({ facts, wcs, values }: SkyImage, square: PlaneSquare): Float32Array {
  const { pixels } = square;
  const step = (2 * square.halfArcsec) / pixels;
  const nodes = Math.ceil(pixels / GRID_STEP) + 1;
  const places = placesOf(facts, wcs, square, nodes, step);
  const covered = Math.min(MOST_AVERAGED, Math.max(1, Math.round(step / facts.pixelArcsec)));
  const out = new Float32Array(pixels * pixels).fill(NaN);
  for (let row = 0; row < pixels; row++) {
    const nodeRow = Math.floor(row / GRID_STEP);
    const down = row / GRID_STEP - nodeRow;
    for (let col = 0; col < pixels; col++) {
      const nodeCol = Math.floor(col / GRID_STEP);
      const along = col / GRID_STEP - nodeCol;
      const at = 2 * (nodeRow * nodes + nodeCol);
      const between = (k: number) =>
        (places[at + k]! * (1 - along) + places[at + 2 + k]! * along) * (1 - down) +
        (places[at + 2 * nodes + k]! * (1 - along) + places[at + 2 * nodes + 2 + k]! * along) * down;
      out[row * pixels + col] = meanAbout(values, facts.width, facts.height, between(0), between(1), covered);
    }
  }
  return out;
}

/** Image pixels (from 1) of the nodes, x and y in turn. */
function placesOf(
  { frame }: SkyImage['facts'],
  wcs: SkyImage['wcs'],
  { raDeg, decDeg, halfArcsec }: PlaneSquare,
  nodes: number,
  step: number,
): Float64Array {
  const places = new Float64Array(2 * nodes * nodes).fill(NaN);
  for (let j = 0; j < nodes; j++) {
    for (let i = 0; i < nodes; i++) {
      const xi = (halfArcsec - (i * GRID_STEP + 0.5) * step) * ARCSECOND;
      const eta = (halfArcsec - (j * GRID_STEP + 0.5) * step) * ARCSECOND;
      const icrs = fromTangentPlane(xi, eta, raDeg * DEGREE, decDeg * DEGREE);
      const { lon, lat } = fromIcrs(frame, icrs.lon, icrs.lat);
      const pixel = wcs.toPixel(lon, lat);
      if (pixel) places.set([pixel.x, pixel.y], 2 * (j * nodes + i));
    }
  }
  return places;
}

function meanAbout(
  values: ArrayLike<number>,
  width: number,
  height: number,
  x: number,
  y: number,
  covered: number,
): number {
  // Pixel 1, at index 0, reaches from 0.5 to 1.5.
  const from = (at: number) => Math.round(at - 0.5 - covered / 2);
  const [left, bottom] = [from(x), from(y)];
  if (!Number.isFinite(left + bottom)) return NaN;
  let [sum, count] = [0, 0];
  for (let row = Math.max(0, bottom); row < Math.min(height, bottom + covered); row++) {
    for (let col = Math.max(0, left); col < Math.min(width, left + covered); col++) {
      const value = values[row * width + col]!;
      if (Number.isNaN(value)) continue;
      sum += value;
      count++;
    }
  }
  return count === 0 ? NaN : sum / count;
}
