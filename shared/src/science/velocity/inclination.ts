import { DomainError } from '../domain-error.ts';

/** Mean of sin i over random orientations, π/4. */
export const MEAN_SIN_INCLINATION = Math.PI / 4;
/** Median inclination of random orientations, radians (60°). */
export const MEDIAN_INCLINATION = Math.PI / 3;

/**
 * Inclination of an oblate disc from its axis ratio, cos² i = (q² - q₀²)/(1 - q₀²).
 *
 * @param axisRatio q = b/a, in (0, 1]
 * @param thickness q₀, intrinsic axis ratio in [0, 1); 0.2 usual, 0.13 for very late types
 * @returns inclination, radians, in [0, π/2]; π/2 for an axis ratio below q₀
 * @throws {DomainError} for ratios out of range
 *
 * Source: Hubble (1926), ApJ 64, 321; Holmberg (1958) (from memory).
 */
export function inclinationOf(axisRatio: number, thickness = 0.2): number {
  if (!(axisRatio > 0 && axisRatio <= 1 && thickness >= 0 && thickness < 1)) {
    throw new DomainError(`inclinationOf: expected 0 < b/a <= 1 and 0 <= q0 < 1, got ${axisRatio} and ${thickness}`);
  }
  const cos2 = (axisRatio ** 2 - thickness ** 2) / (1 - thickness ** 2);
  return Math.acos(Math.sqrt(Math.min(1, Math.max(0, cos2))));
}

/**
 * Inclination at a quantile of random orientations, whose density is sin i: the distribution to carry where no
 * starlight shows the shape.
 *
 * @param quantile in [0, 1]; evenly spread numbers give random orientations
 * @returns inclination, radians, arccos(1 - quantile)
 * @throws {DomainError} for a quantile out of range
 *
 * Source: isotropy.
 */
export function randomInclination(quantile: number): number {
  if (!(quantile >= 0 && quantile <= 1)) throw new DomainError(`randomInclination: got the quantile ${quantile}`);
  return Math.acos(1 - quantile);
}

/**
 * Rotation velocity of an inclined disc, W/(2 sin i).
 *
 * @param widthKms rotational width, km/s
 * @param inclination radians, in (0, π/2]
 * @returns km/s; with i = π/2 it is the lower limit that holds for any inclination
 * @throws {DomainError} for a negative width or an inclination out of range
 */
export function rotationVelocity(widthKms: number, inclination: number): number {
  const sine = Math.sin(inclination);
  if (!(widthKms >= 0 && widthKms < Infinity) || !(inclination > 0 && inclination <= Math.PI / 2)) {
    throw new DomainError(`rotationVelocity: got ${widthKms} km/s at an inclination of ${inclination} rad`);
  }
  return widthKms / (2 * sine);
}

/** Rotation velocity with its spread when the inclination is unknown. */
export interface RotationRange {
  readonly lowestKms: number;
  readonly medianKms: number;
  readonly lower16Kms: number;
  readonly upper84Kms: number;
}

/**
 * Rotation velocity with unknown inclination: quantiles over random orientations.
 *
 * @param widthKms rotational width, km/s
 * @returns km/s: the least possible (edge-on), the median (i = 60°) and the 16th and 84th per cent
 * @throws {DomainError} for a negative width
 */
export function rotationOfUnknownInclination(widthKms: number): RotationRange {
  const at = (quantile: number) => rotationVelocity(widthKms, randomInclination(quantile));
  return { lowestKms: at(1), medianKms: at(0.5), lower16Kms: at(0.84), upper84Kms: at(0.16) };
}
