import type { Covariance } from './position-error.ts';
import { NO_TAIL, type OffsetTail } from './search-radius.ts';

function gaussianDensity(ee: number, nn: number, en: number, east: number, north: number): number {
  const determinant = ee * nn - en * en;
  const d2 = (nn * east * east - 2 * en * east * north + ee * north * north) / determinant;
  return Math.exp(-0.5 * d2) / (2 * Math.PI * Math.sqrt(determinant));
}

/**
 * Density of true counterparts at an offset from the HI position.
 *
 * @param hi covariance of the HI position with its systematic part, square arcsec
 * @param opticalSigmaArcsec 1-D error of the candidate, arcsec
 * @param eastArcsec offset east, arcsec
 * @param northArcsec offset north, arcsec
 * @param tail wide component of the offsets
 * @returns probability per square arcsec
 */
export function offsetDensity(
  hi: Covariance,
  opticalSigmaArcsec: number,
  eastArcsec: number,
  northArcsec: number,
  tail: OffsetTail = NO_TAIL,
): number {
  const optical = opticalSigmaArcsec ** 2;
  const core = gaussianDensity(hi.ee + optical, hi.nn + optical, hi.en, eastArcsec, northArcsec);
  if (tail.fraction === 0) return core;
  const added = optical + tail.widthArcsec ** 2;
  const wide = gaussianDensity(hi.ee + added, hi.nn + added, hi.en, eastArcsec, northArcsec);
  return (1 - tail.fraction) * core + tail.fraction * wide;
}
