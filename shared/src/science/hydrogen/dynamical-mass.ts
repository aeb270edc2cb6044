import { ARCSECOND, GRAVITATION_KPC_KMS2 } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { FWHM_PER_SIGMA } from '../robustness/gaussian.ts';

/**
 * Dynamical mass inside a radius from a rotation speed.
 *
 * @param speedKms circular speed, km/s, not negative; with an unknown inclination use W/2, which gives a lower limit
 * @param radiusKpc radius, kpc, positive
 * @returns mass, solar masses
 * @throws {DomainError} if an input is out of range
 *
 * Source: M = V^2 R / G for a spherical mass; a thin disc differs by up to 30 per cent.
 */
export function dynamicalMass(speedKms: number, radiusKpc: number): number {
  if (!(speedKms >= 0 && radiusKpc > 0)) {
    throw new DomainError(`dynamicalMass: expected V >= 0 and R > 0, got ${speedKms} km/s, ${radiusKpc} kpc`);
  }
  return (speedKms ** 2 * radiusKpc) / GRAVITATION_KPC_KMS2;
}

/**
 * Dynamical mass of a cloud held up by dispersion: for widths under about 30 km/s, where rotation is not shown.
 *
 * @param width50Kms width at half the peak, km/s
 * @param radiusKpc radius, kpc
 * @param k structure factor: 1 (indicative), 3 or 5 are in use; state it
 * @returns mass, solar masses
 * @throws {DomainError} if an input is out of range
 *
 * Source: M = k sigma^2 R / G with sigma = W50 / 2.35482.
 */
export function dispersionMass(width50Kms: number, radiusKpc: number, k = 1): number {
  if (!(k > 0)) throw new DomainError(`dispersionMass: k must be positive, got ${k}`);
  return k * dynamicalMass(width50Kms / FWHM_PER_SIGMA, radiusKpc);
}

/**
 * Indicative dynamical mass of a cloud from what is measured on the sky.
 *
 * @param diameterArcmin full angular diameter, arcmin
 * @param width50Kms width at half the peak, km/s
 * @param angularMpc distance, Mpc
 * @returns mass, solar masses, with k = 1
 * @throws {DomainError} if an input is out of range
 *
 * The exact coefficient is 6098 a D W50^2; 6.2e3 is printed (Giovanelli et al. 2010; Adams et al. 2013, from memory).
 */
export function cloudDynamicalMass(diameterArcmin: number, width50Kms: number, angularMpc: number): number {
  return dispersionMass(width50Kms, 0.5 * diameterArcmin * 60 * ARCSECOND * angularMpc * 1000);
}
