import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';

/**
 * Difference of two right ascensions the short way round, without loss where they lie on either side of 0.
 *
 * @param fromDeg in [0, 360)
 * @param toDeg in [0, 360)
 * @returns `toDeg - fromDeg`, degrees, in [-180, 180]; taking 360 from a number in [180, 360) is exact in binary
 */
export function raDifferenceDeg(fromDeg: number, toDeg: number): number {
  const difference = toDeg - fromDeg;
  if (difference > 180) return toDeg - 360 - fromDeg;
  if (difference < -180) return toDeg - (fromDeg - 360);
  return difference;
}

/** Cosine of a declination in degrees, by the sine of the polar distance: exactly 0 at a pole, precise beside it. */
const cosDec = (decDeg: number): number => Math.sin((90 - Math.abs(decDeg)) * DEGREE);

/**
 * Great-circle separation of two directions, seconds of arc in [0, 648000].
 *
 * The formula of Vincenty (1975, Survey Review 23, 88) for the sphere, with its two sums rewritten in the differences
 * of the coordinates, so that relative precision is kept at any separation: positions in degrees still tell one part
 * in 1e8 of a milliarcsecond apart, where products of sines would not. It decides every match; nothing is checked here
 * because it sits in the inner loop.
 *
 * @param raDeg1 right ascensions in [0, 360), declinations in [-90, 90], degrees, same frame and epoch
 */
export function separationArcsec(raDeg1: number, decDeg1: number, raDeg2: number, decDeg2: number): number {
  const halfRa = raDifferenceDeg(raDeg1, raDeg2) * (DEGREE / 2);
  const dDec = (decDeg2 - decDeg1) * DEGREE;
  const cosDec2 = cosDec(decDeg2);
  const sinHalf = Math.sin(halfRa);
  const versine = 2 * sinHalf * sinHalf;
  const east = cosDec2 * 2 * sinHalf * Math.cos(halfRa);
  const north = Math.sin(dDec) + Math.sin(decDeg1 * DEGREE) * cosDec2 * versine;
  const along = Math.cos(dDec) - cosDec(decDeg1) * cosDec2 * versine;
  return Math.atan2(Math.sqrt(east * east + north * north), along) / ARCSECOND;
}
