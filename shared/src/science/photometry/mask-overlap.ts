import { DomainError } from '../domain-error.ts';

/**
 * Area common to two circles in the plane.
 *
 * @param a radius of one, any unit, not negative
 * @param b radius of the other, same unit, not negative
 * @param distance distance of the centres, same unit, not negative
 * @returns area, that unit squared
 * @throws {DomainError} if an input is negative or not finite
 *
 * Source: circle-circle intersection; flat sky, good to 1e-6 below a degree.
 */
export function circleOverlap(a: number, b: number, distance: number): number {
  if (![a, b, distance].every((x) => x >= 0 && Number.isFinite(x))) {
    throw new DomainError(`circleOverlap: expected lengths >= 0, got ${a}, ${b}, ${distance}`);
  }
  if (distance >= a + b) return 0;
  if (distance <= Math.abs(a - b)) return Math.PI * Math.min(a, b) ** 2;
  const clamp = (x: number) => Math.min(1, Math.max(-1, x));
  const alpha = Math.acos(clamp((distance ** 2 + a ** 2 - b ** 2) / (2 * distance * a)));
  const beta = Math.acos(clamp((distance ** 2 + b ** 2 - a ** 2) / (2 * distance * b)));
  return a ** 2 * (alpha - Math.sin(2 * alpha) / 2) + b ** 2 * (beta - Math.sin(2 * beta) / 2);
}

/** A masked circle: offset of its centre east and north of the detection and its radius, arcsec. */
export interface MaskCircle {
  eastArcsec: number;
  northArcsec: number;
  radiusArcsec: number;
}

const SAMPLES = 1000;
const GOLDEN_ANGLE = Math.PI * (3 - Math.sqrt(5));

/**
 * Share of the positional probability inside a search radius that lies under masks.
 *
 * @param sigmaArcsec 1-D position error, arcsec, positive
 * @param searchArcsec search radius, arcsec, positive
 * @param masks masked circles; overlaps count once
 * @returns fraction in [0, 1]: the probability that counts, not the area
 * @throws {DomainError} if error or radius is not positive
 *
 * 1000 fixed points of equal probability on a sunflower pattern: the same answer every time, good to about 0.005.
 *
 * Method: absence.
 */
export function maskedProbability(sigmaArcsec: number, searchArcsec: number, masks: readonly MaskCircle[]): number {
  if (!(sigmaArcsec > 0 && searchArcsec > 0)) {
    throw new DomainError(`maskedProbability: got sigma ${sigmaArcsec}, radius ${searchArcsec} arcsec`);
  }
  const near = masks.filter((m) => Math.hypot(m.eastArcsec, m.northArcsec) < searchArcsec + m.radiusArcsec);
  if (near.length === 0) return 0;
  const inside = -Math.expm1(-0.5 * (searchArcsec / sigmaArcsec) ** 2);
  let masked = 0;
  for (let k = 0; k < SAMPLES; k++) {
    const radius = sigmaArcsec * Math.sqrt(-2 * Math.log1p(-inside * ((k + 0.5) / SAMPLES)));
    const east = radius * Math.sin(k * GOLDEN_ANGLE);
    const north = radius * Math.cos(k * GOLDEN_ANGLE);
    if (near.some((m) => Math.hypot(east - m.eastArcsec, north - m.northArcsec) <= m.radiusArcsec)) masked++;
  }
  return masked / SAMPLES;
}
