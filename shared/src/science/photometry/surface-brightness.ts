import { DomainError } from '../domain-error.ts';

/** b_1 of a Sersic profile with n = 1: the effective radius in scale lengths (Graham & Driver 2005). */
export const SERSIC_B1 = 1.6783469900170387;
/** mu(r_e) - <mu>_e of an exponential disc, mag. */
export const EXPONENTIAL_EDGE_MAG = 2.5 * Math.log10(Math.exp(SERSIC_B1) / SERSIC_B1 ** 2);
/** mu(r_e) - mu_0 of an exponential disc, mag. */
export const EXPONENTIAL_CENTRE_MAG = (2.5 * SERSIC_B1) / Math.LN10;

/**
 * Mean surface brightness inside the effective radius.
 *
 * @param magnitude total magnitude
 * @param effectiveRadiusArcsec half-light radius along the major axis, arcsec, positive
 * @param axisRatio minor over major axis, in (0, 1]
 * @returns mag per square arcsec
 * @throws {DomainError} if radius or axis ratio is out of range
 *
 * Source: definition, m + 2.5 log10(2 pi q r_e^2).
 */
export function meanSurfaceBrightness(magnitude: number, effectiveRadiusArcsec: number, axisRatio = 1): number {
  if (!(effectiveRadiusArcsec > 0 && axisRatio > 0 && axisRatio <= 1)) {
    throw new DomainError(`meanSurfaceBrightness: got r_e ${effectiveRadiusArcsec} arcsec, q ${axisRatio}`);
  }
  return magnitude + 2.5 * Math.log10(2 * Math.PI * axisRatio * effectiveRadiusArcsec ** 2);
}

/**
 * Central and effective surface brightness of an exponential disc.
 *
 * @param meanMag mean surface brightness inside r_e, mag per square arcsec
 * @returns `central` and `atEffectiveRadius`, mag per square arcsec
 *
 * Source: Graham & Driver (2005), PASA 22, 118.
 */
export function exponentialDisc(meanMag: number): { central: number; atEffectiveRadius: number } {
  const atEffectiveRadius = meanMag + EXPONENTIAL_EDGE_MAG;
  return { central: atEffectiveRadius - EXPONENTIAL_CENTRE_MAG, atEffectiveRadius };
}

/**
 * Converts a surface-brightness limit between significances and box sizes.
 *
 * @param limitMag limit at `fromSigmas` in a box of `fromSideArcsec`
 * @returns limit at `toSigmas` in a box of `toSideArcsec`, mag per square arcsec
 * @throws {DomainError} if a significance or a side is not positive
 *
 * White noise. Source: Roman, Trujillo & Montes (2020), A&A 644, A42, app. A (form from memory).
 */
export function convertSurfaceLimit(
  limitMag: number,
  fromSigmas: number,
  fromSideArcsec: number,
  toSigmas: number,
  toSideArcsec: number,
): number {
  if (![fromSigmas, fromSideArcsec, toSigmas, toSideArcsec].every((x) => x > 0)) {
    throw new DomainError('convertSurfaceLimit: significances and box sides must be positive');
  }
  return limitMag + 2.5 * Math.log10((fromSigmas * toSideArcsec) / (toSigmas * fromSideArcsec));
}
