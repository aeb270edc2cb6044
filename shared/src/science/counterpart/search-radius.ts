import { DomainError } from '../domain-error.ts';
import type { ErrorEllipse } from './position-error.ts';

/** A wide component of the offsets: this share of true pairs has `widthArcsec` added in quadrature on each axis. */
export interface OffsetTail {
  fraction: number;
  widthArcsec: number;
}

export const NO_TAIL: OffsetTail = { fraction: 0, widthArcsec: 0 };

/** Points on a quarter of the circle; the trapezoid of a periodic function, exact to 1e-6 up to axis ratio 10. */
const POINTS = 48;

/**
 * Share of an elliptical Gaussian outside a circle about its centre.
 *
 * @param radiusArcsec radius of the circle
 * @param majorArcsec 1-D sigma along one axis
 * @param minorArcsec 1-D sigma along the other
 */
function outsideCircle(radiusArcsec: number, majorArcsec: number, minorArcsec: number): number {
  if (majorArcsec === minorArcsec) return Math.exp(-0.5 * (radiusArcsec / majorArcsec) ** 2);
  let sum = 0;
  for (let k = 0; k < POINTS; k++) {
    const angle = (Math.PI / 2) * ((k + 0.5) / POINTS);
    const q = (Math.cos(angle) / majorArcsec) ** 2 + (Math.sin(angle) / minorArcsec) ** 2;
    sum += Math.exp(-0.5 * radiusArcsec ** 2 * q) / q;
  }
  return sum / POINTS / (majorArcsec * minorArcsec);
}

/**
 * Share of true offsets inside a circle about the HI position.
 *
 * @param radiusArcsec radius, arcsec
 * @param error 1-D errors of the core, all terms in
 * @param tail wide component
 * @returns probability in [0, 1]
 *
 * Method: position.
 */
export function shareInside(radiusArcsec: number, error: ErrorEllipse, tail: OffsetTail = NO_TAIL): number {
  const { majorArcsec: a, minorArcsec: b } = error;
  const core = outsideCircle(radiusArcsec, a, b);
  if (tail.fraction === 0) return 1 - core;
  const wide = outsideCircle(radiusArcsec, Math.hypot(a, tail.widthArcsec), Math.hypot(b, tail.widthArcsec));
  return 1 - (1 - tail.fraction) * core - tail.fraction * wide;
}

/**
 * Radius of the circle that holds a share of the true offsets.
 *
 * @param share share wanted, between 0 and 1
 * @param error 1-D errors of the core, all terms in
 * @param tail wide component
 * @returns radius, arcsec, good to 1e-9 of itself
 * @throws {DomainError} if the share or an error is out of range
 *
 * 0.997 of a mixture with a tail is wider than 3.44 sigma of its core.
 *
 * Method: position.
 */
export function radiusHolding(share: number, error: ErrorEllipse, tail: OffsetTail = NO_TAIL): number {
  if (!(share > 0 && share < 1) || !(error.majorArcsec > 0 && error.minorArcsec > 0)) {
    throw new DomainError(`radiusHolding: got share ${share}, errors ${error.majorArcsec}, ${error.minorArcsec}`);
  }
  let low = 0;
  let high = 8 * Math.hypot(error.majorArcsec, error.minorArcsec, tail.fraction > 0 ? tail.widthArcsec : 0);
  while (high - low > 1e-9 * high) {
    const middle = (low + high) / 2;
    if (shareInside(middle, error, tail) < share) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** A beam over this FWHM, arcsec, is taken for a single dish: tail and half-beam floor apply. */
export const SINGLE_DISH_BEAM_ARCSEC = 60;
