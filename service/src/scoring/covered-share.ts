import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { cellSide } from '@eremite/shared/science/sky/healpix';
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
