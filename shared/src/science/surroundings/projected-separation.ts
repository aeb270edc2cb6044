import { ARCSECOND } from '../constants.ts';

/**
 * Projected separation, kpc = 1000 D theta.
 *
 * @param separationArcsec angle, arcsec
 * @param angularMpc angular-diameter distance, Mpc
 */
export function projectedKpc(separationArcsec: number, angularMpc: number): number {
  return 1000 * angularMpc * separationArcsec * ARCSECOND;
}

/** Angle of a projected length, arcsec; the inverse of {@link projectedKpc}. */
export function angleOfKpc(kpc: number, angularMpc: number): number {
  return kpc / (1000 * angularMpc * ARCSECOND);
}
