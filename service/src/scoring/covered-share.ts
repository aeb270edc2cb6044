import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { cellCentre, cellOf, cellRadius, cellSide } from '@eremite/shared/science/sky/healpix';
import type { Moc } from '@eremite/shared/science/sky/moc';

/** Directions in which the rim of a small circle is looked at. */
const RIM = Array.from({ length: 8 }, (_, k) => (2 * Math.PI * k) / 8);

/**
 * Covered share of a circle about a detection.
 *
 * A circle no wider than two cells of the region, whose centre and rim are all inside or all outside, is taken as whole
 * or empty without further ado: a gap between would be smaller than the region's own resolution there.
 *
 * @param radiusRad radius, radians
 */
export function coveredCircle(moc: Moc, raDeg: number, decDeg: number, radiusRad: number): number {
  const ra = (((raDeg % 360) + 360) % 360) * DEGREE;
  const dec = decDeg * DEGREE;
  const about = heldAbout(moc, ra, dec, radiusRad);
  if (about !== 'some') return about === 'all' ? 1 : 0;
  if (radiusRad <= cellSide(moc.order) && Math.abs(dec) + radiusRad < 1.5) {
    const inside = moc.contains(ra, dec);
    const stretch = radiusRad / Math.cos(dec);
    const agrees = RIM.every((angle) => {
      const lon = ra + stretch * Math.sin(angle);
      return moc.contains(lon < 0 ? lon + 2 * Math.PI : lon, dec + radiusRad * Math.cos(angle)) === inside;
    });
    if (agrees) return inside ? 1 : 0;
  }
  return moc.coveredFraction(ra, dec, Math.min(Math.PI, radiusRad));
}

type Held = ReturnType<Moc['holdsCone']>;
/** What is known of the cones about whole cells: most circles of a run lie deep inside a region or far outside. */
const known = new WeakMap<Moc, Map<number, Held>>();
/** Cells of 3.7 degrees, in each of which there are many detections of a large survey. */
const ABOUT_ORDER = 4;
/** Radii looked at, radians: each twice the last. */
const LEAST_ABOUT = 2 ** -11;
const MOST_ABOUT = 8;

/**
 * Whether a region holds all or nothing of a cone that holds the circle: one about the centre of a cell in which the circle's
 * centre lies, worked out once a cell. `some` where that cannot tell.
 */
function heldAbout(moc: Moc, ra: number, dec: number, radiusRad: number): Held {
  const step = Math.max(0, Math.ceil(Math.log2(radiusRad / LEAST_ABOUT)));
  if (!(step < MOST_ABOUT)) return 'some';
  const cell = cellOf(ABOUT_ORDER, ra, dec);
  let cells = known.get(moc);
  if (!cells) known.set(moc, (cells = new Map<number, Held>()));
  const key = cell * MOST_ABOUT + step;
  let held = cells.get(key);
  if (held === undefined) {
    const { lon, lat } = cellCentre(ABOUT_ORDER, cell);
    held = moc.holdsCone(lon, lat, LEAST_ABOUT * 2 ** step + cellRadius(ABOUT_ORDER) * (1 + 1e-9));
    cells.set(key, held);
  }
  return held;
}

/** Covered shares of the search circles, each worked out once a run. NaN: coverage unknown. */
export class CoveredShares {
  private readonly known: Float64Array;
  constructor(
    detections: number,
    private readonly catalogues: number,
  ) {
    this.known = new Float64Array(detections * catalogues).fill(-1);
  }

  of(
    detection: { position: number; raDeg: number; decDeg: number; searchArcsec: number },
    { index, moc }: { index: number; moc: Moc | null },
  ): number | null {
    if (!moc) return null;
    const at = detection.position * this.catalogues + index;
    if (this.known[at]! < 0) {
      this.known[at] = coveredCircle(moc, detection.raDeg, detection.decDeg, detection.searchArcsec * ARCSECOND);
    }
    return this.known[at]!;
  }
}
