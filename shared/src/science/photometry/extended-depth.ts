import { DomainError } from '../domain-error.ts';
import { FWHM_PER_SIGMA } from '../robustness/gaussian.ts';
import { meanSurfaceBrightness } from './surface-brightness.ts';

/** Half the light lies outside r_e: 2.5 log10 2, mag. */
const HALF_LIGHT_MAG = 2.5 * Math.log10(2);

/** Depth of one band at one place. */
export interface PointDepth {
  /** 5-sigma point-source limiting magnitude. */
  limitMag: number;
  /** Image quality, FWHM in arcsec. */
  fwhmArcsec: number;
}

/** Effective area of a point source in white noise, square arcsec: 4 pi (FWHM / 2.35482)^2. */
export function pointSourceArea(fwhmArcsec: number): number {
  if (!(fwhmArcsec > 0)) throw new DomainError(`pointSourceArea: FWHM must be positive, got ${fwhmArcsec} arcsec`);
  return 4 * Math.PI * (fwhmArcsec / FWHM_PER_SIGMA) ** 2;
}

/**
 * Limiting total magnitude of an extended galaxy from a point-source depth.
 *
 * @param depth 5-sigma point-source depth and image quality
 * @param effectiveRadiusArcsec half-light radius, arcsec, not negative
 * @param penaltyMag what real catalogues lose besides (sky subtraction, deblending, cuts); 0.5-1 mag is common
 * @returns limiting total magnitude; never deeper than the point-source depth
 * @throws {DomainError} if an input is out of range
 *
 * White noise growing as the square root of the area. Source: 5 sigma inside r_e, which holds half of the light.
 *
 * Method: absence.
 */
export function extendedLimit(depth: PointDepth, effectiveRadiusArcsec: number, penaltyMag = 0): number {
  if (!(effectiveRadiusArcsec >= 0 && penaltyMag >= 0) || !Number.isFinite(depth.limitMag)) {
    throw new DomainError(
      `extendedLimit: got depth ${depth.limitMag}, r_e ${effectiveRadiusArcsec} arcsec, penalty ${penaltyMag} mag`,
    );
  }
  return depth.limitMag - Math.max(0, extendedLoss(depth, effectiveRadiusArcsec)) - penaltyMag;
}

/**
 * What a galaxy's extent costs against a point source, mag; below zero for one smaller than the image quality, which is a
 * point source and loses nothing. It grows by 2.5 mag for each factor of ten in radius.
 *
 * @throws {DomainError} if depth or image quality is not usable
 */
export function extendedLoss({ limitMag, fwhmArcsec }: PointDepth, effectiveRadiusArcsec: number): number {
  if (!Number.isFinite(limitMag)) throw new DomainError(`extendedLoss: got depth ${limitMag}`);
  // The logarithm is of the square root of the area.
  return 1.25 * Math.log10((Math.PI * effectiveRadiusArcsec ** 2) / pointSourceArea(fwhmArcsec)) + HALF_LIGHT_MAG;
}

/** Mean surface brightness inside r_e of a galaxy at its extended limit, mag per square arcsec. */
export function surfaceLimitInside(depth: PointDepth, effectiveRadiusArcsec: number, penaltyMag = 0): number {
  return meanSurfaceBrightness(extendedLimit(depth, effectiveRadiusArcsec, penaltyMag), effectiveRadiusArcsec);
}

/**
 * Surface-brightness limit in a square box.
 *
 * @param depth 5-sigma point-source depth and image quality
 * @param sigmas significance wanted, positive
 * @param sideArcsec side of the box, arcsec, positive
 * @returns mag per square arcsec
 * @throws {DomainError} if an input is out of range
 */
export function surfaceLimitInBox(depth: PointDepth, sigmas: number, sideArcsec: number): number {
  if (!(sigmas > 0 && sideArcsec > 0)) {
    throw new DomainError(`surfaceLimitInBox: got ${sigmas} sigma, side ${sideArcsec} arcsec`);
  }
  return depth.limitMag + 2.5 * Math.log10((5 * Math.sqrt(pointSourceArea(depth.fwhmArcsec)) * sideArcsec) / sigmas);
}
