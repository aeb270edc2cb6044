import { DomainError } from '../domain-error.ts';

/** One-dimensional errors along two perpendicular axes; the angle is that of the major axis, north through east. */
export interface ErrorEllipse {
  majorArcsec: number;
  minorArcsec: number;
  angleRad: number;
}

/** Covariance of a position on the tangent plane, square arcsec: east-east, north-north, east-north. */
export interface Covariance {
  ee: number;
  nn: number;
  en: number;
}

/** What an error column states: one axis, the mean radial offset, or the radius holding 68.27, 90 or 95 per cent. */
export type ErrorMeaning = 'sigma1d' | 'meanRadial' | 'radial68' | 'radial90' | 'radial95';

/** Condon (1997), PASP 109, 166: unresolved source in noise correlated over the beam, 1/sqrt(8 ln 2). */
export const CONDON_FACTOR = 1 / Math.sqrt(8 * Math.LN2);

/**
 * Radius that holds a share of a circular Gaussian, in units of the one-dimensional sigma.
 *
 * @param share probability, 0 to below 1
 * @throws {DomainError} outside that range
 *
 * Source: Rayleigh distribution, sqrt(-2 ln(1 - p)).
 */
export function rayleighRadius(share: number): number {
  if (!(share >= 0 && share < 1)) throw new DomainError(`rayleighRadius: share must lie in [0, 1), got ${share}`);
  return Math.sqrt(-2 * Math.log1p(-share));
}

const MEANING_FACTOR: Record<ErrorMeaning, number> = {
  sigma1d: 1,
  meanRadial: Math.sqrt(Math.PI / 2),
  radial68: rayleighRadius(0.682689492137086),
  radial90: rayleighRadius(0.9),
  radial95: rayleighRadius(0.95),
};

/** One-dimensional sigma of a stated error; same unit as the error. */
export function sigmaOfError(error: number, meaning: ErrorMeaning): number {
  return error / MEANING_FACTOR[meaning];
}

/**
 * Statistical error of an HI centroid along one beam axis.
 *
 * @param fwhmArcsec beam FWHM along the axis, arcsec
 * @param signalToNoise integrated, matched-filter signal-to-noise
 * @param factor 0.60 by default (Ivison et al. 2007, MNRAS 380, 199, from memory); see {@link CONDON_FACTOR}
 * @returns 1-D sigma, arcsec
 * @throws {DomainError} if an input is not positive
 *
 * Method: position.
 */
export function centroidError(fwhmArcsec: number, signalToNoise: number, factor = 0.6): number {
  if (!(fwhmArcsec > 0 && signalToNoise > 0 && factor > 0)) {
    throw new DomainError(`centroidError: got FWHM ${fwhmArcsec} arcsec, S/N ${signalToNoise}, factor ${factor}`);
  }
  return (factor * fwhmArcsec) / signalToNoise;
}

/**
 * Systematic pointing error that goes with a beam, where a survey states none.
 *
 * @param fwhmArcsec beam FWHM, arcsec; the larger axis
 * @returns 1-D sigma, arcsec: 2 up to 1 arcmin, 10 up to 4 arcmin, 60 from 15 arcmin, in proportion between 4 and 15
 *
 * Common practice for interferometers and single dishes.
 */
export function systematicError(fwhmArcsec: number): number {
  if (fwhmArcsec <= 60) return 2;
  if (fwhmArcsec <= 240) return 10;
  return fwhmArcsec >= 900 ? 60 : 10 + (50 * (fwhmArcsec - 240)) / 660;
}

/** Adds a circular error in quadrature to both axes. */
export function widened(ellipse: ErrorEllipse, sigmaArcsec: number): ErrorEllipse {
  return {
    majorArcsec: Math.hypot(ellipse.majorArcsec, sigmaArcsec),
    minorArcsec: Math.hypot(ellipse.minorArcsec, sigmaArcsec),
    angleRad: ellipse.angleRad,
  };
}

/** Covariance of an ellipse on the tangent plane. */
export function covarianceOf({ majorArcsec, minorArcsec, angleRad }: ErrorEllipse): Covariance {
  const sin = Math.sin(angleRad);
  const cos = Math.cos(angleRad);
  const a = majorArcsec ** 2;
  const b = minorArcsec ** 2;
  return { ee: a * sin * sin + b * cos * cos, nn: a * cos * cos + b * sin * sin, en: (a - b) * sin * cos };
}

/**
 * Squared Mahalanobis distance of an offset; a larger one has probability exp(-d2/2) for a true pair.
 *
 * @param covariance total covariance, square arcsec
 * @param eastArcsec offset east (times cos dec), arcsec
 * @param northArcsec offset north, arcsec
 *
 * Method: position.
 */
export function mahalanobisSquared(covariance: Covariance, eastArcsec: number, northArcsec: number): number {
  const { ee, nn, en } = covariance;
  const determinant = ee * nn - en * en;
  return (nn * eastArcsec ** 2 - 2 * en * eastArcsec * northArcsec + ee * northArcsec ** 2) / determinant;
}
