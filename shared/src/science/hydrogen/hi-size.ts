import { ARCSECOND } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/**
 * Diameter of an ordinary HI disc where its surface density falls to 1 solar mass per square parsec.
 *
 * @param logMass log10 of the HI mass in solar masses, without helium
 * @returns diameter, kpc; scatter 0.06 dex
 * @throws {DomainError} if the mass is not finite
 *
 * A cloud much larger than this is no ordinary disc, whatever its distance. Calibrated from about 1e5.5 to 1e11.
 * Source: Wang et al. (2016), MNRAS 460, 2143: log D = 0.506 log M - 3.293.
 *
 * Method: hi-mass.
 */
export function hiDiameterKpc(logMass: number): number {
  if (!Number.isFinite(logMass)) throw new DomainError(`hiDiameterKpc: log mass must be finite, got ${logMass}`);
  return 10 ** (0.506 * logMass - 3.293);
}

/**
 * Angle under which that diameter is seen.
 *
 * @param logMass log10 of the HI mass in solar masses
 * @param angularMpc angular-diameter distance, Mpc, positive
 * @returns diameter, arcmin: for a given flux nearly independent of distance (as D^0.012)
 * @throws {DomainError} if the distance is not positive
 */
export function hiDiameterArcmin(logMass: number, angularMpc: number): number {
  if (!(angularMpc > 0)) throw new DomainError(`hiDiameterArcmin: distance must be positive, got ${angularMpc} Mpc`);
  return hiDiameterKpc(logMass) / (angularMpc * 1000) / (60 * ARCSECOND);
}

/**
 * Mean HI surface density inside that diameter.
 *
 * @param logMass log10 of the HI mass in solar masses
 * @returns solar masses per square parsec (near 3.9 for every mass)
 */
export function meanHiSurfaceDensity(logMass: number): number {
  const radiusPc = 500 * hiDiameterKpc(logMass);
  return 10 ** logMass / (Math.PI * radiusPc ** 2);
}
