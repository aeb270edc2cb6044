import { upperIncompleteGamma } from '../robustness/gamma-function.ts';

/** Luminosity function of galaxies. */
export interface LuminosityFunction {
  /** phi*, h^3 per cubic Mpc. */
  phiStarH3: number;
  /** M* - 5 log h. */
  mStarH: number;
  alpha: number;
}

/** Blanton et al. (2003), ApJ 592, 819, r band shifted to z = 0.1; M* verified, phi* and alpha from memory. */
export const BLANTON_2003: LuminosityFunction = { phiStarH3: 1.49e-2, mStarH: -20.44, alpha: -1.05 };

/**
 * Number density of galaxies brighter than an absolute magnitude.
 *
 * @param absoluteMag limit, r
 * @param h0 Hubble constant, km/s/Mpc
 * @param law luminosity function
 * @returns per cubic Mpc
 *
 * phi* Gamma(alpha + 1, 10^(-0.4 (M - M*))).
 */
export function densityBrighterThan(absoluteMag: number, h0 = 70, law = BLANTON_2003): number {
  const h = h0 / 100;
  const mStar = law.mStarH + 5 * Math.log10(h);
  return law.phiStarH3 * h ** 3 * upperIncompleteGamma(law.alpha + 1, 10 ** (-0.4 * (absoluteMag - mStar)));
}
