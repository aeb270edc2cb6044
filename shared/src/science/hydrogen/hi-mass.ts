import { HI_REST_FREQUENCY_MHZ, SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { HI_MASS_CONSTANT, HI_MASS_CONSTANT_JY_HZ } from './hi-mass-constant.ts';

/**
 * The velocity in which a line flux was integrated.
 * `optical`: d(cz); `source`: c(1+z)dnu/nu0; `radio`: c dnu/nu0; `local`: the usual form without a redshift factor.
 */
export type FluxVelocity = 'optical' | 'source' | 'radio' | 'local';

const EXPONENT: Record<FluxVelocity, number> = { optical: 2, source: 1, radio: 0, local: 0 };

/**
 * HI mass of an optically thin source.
 *
 * @param fluxJyKms integrated line flux, Jy km/s, positive
 * @param luminosityMpc luminosity distance, Mpc, positive
 * @param redshift redshift of the line, > -1 (blueshifted local sources are legal)
 * @param velocity the velocity the flux was integrated in
 * @returns HI mass, solar masses, without helium
 * @throws {DomainError} if flux or distance is not positive or the redshift is not above -1
 *
 * Self-absorption is ignored (up to 10-20 per cent edge-on). Without its factor the local form is 1.7 per cent too
 * high at z = 0.0083 and 10 per cent at z = 0.05.
 * Source: M = 2.356e5 D_L^2 S (1+z)^-k, k = 2, 1, 0; Meyer et al. (2017), PASA 34, e052.
 *
 * Method: hi-mass.
 */
export function hiMass(
  fluxJyKms: number,
  luminosityMpc: number,
  redshift = 0,
  velocity: FluxVelocity = 'optical',
): number {
  check('hiMass', fluxJyKms, luminosityMpc, redshift);
  return (HI_MASS_CONSTANT * luminosityMpc ** 2 * fluxJyKms) / (1 + redshift) ** EXPONENT[velocity];
}

/**
 * HI mass from a flux integrated over frequency; free of any velocity convention.
 *
 * @param fluxJyHz integrated flux, Jy Hz, positive
 * @param luminosityMpc luminosity distance, Mpc, positive
 * @returns HI mass, solar masses
 * @throws {DomainError} if either is not positive
 *
 * Source: Meyer et al. (2017), PASA 34, e052 (constant 49.7).
 */
export function hiMassFromFrequency(fluxJyHz: number, luminosityMpc: number): number {
  check('hiMassFromFrequency', fluxJyHz, luminosityMpc, 0);
  return HI_MASS_CONSTANT_JY_HZ * luminosityMpc ** 2 * fluxJyHz;
}

/**
 * Flux that a mass would show: the inverse of `hiMass`.
 *
 * @param massSolar HI mass, solar masses, positive
 * @param luminosityMpc luminosity distance, Mpc, positive
 * @param redshift redshift, > -1
 * @param velocity velocity of the flux wanted
 * @returns integrated flux, Jy km/s
 * @throws {DomainError} as `hiMass`
 */
export function hiFlux(
  massSolar: number,
  luminosityMpc: number,
  redshift = 0,
  velocity: FluxVelocity = 'optical',
): number {
  check('hiFlux', massSolar, luminosityMpc, redshift);
  return (massSolar * (1 + redshift) ** EXPONENT[velocity]) / (HI_MASS_CONSTANT * luminosityMpc ** 2);
}

/**
 * Flux in Jy Hz of a line flux in Jy km/s of optical velocity.
 *
 * @param fluxJyKms flux, Jy km/s of optical velocity
 * @param redshift redshift, > -1
 * @returns flux, Jy Hz (observed frequency)
 */
export function fluxInJyHz(fluxJyKms: number, redshift: number): number {
  return (fluxJyKms * HI_REST_FREQUENCY_MHZ * 1e6) / (SPEED_OF_LIGHT_KMS * (1 + redshift) ** 2);
}

/**
 * Fractional error of an HI mass.
 *
 * @param fluxFraction sigma_S / S
 * @param distanceFraction sigma_D / D (the peculiar-velocity floor included)
 * @param scaleFraction calibration of the flux scale, 0.05-0.10 for a single dish; 0 to leave it out
 * @returns sigma_M / M, linear; divide by ln 10 for dex
 * @throws {DomainError} if an input is negative or not finite
 *
 * First order only: above about 0.5 sample the distance instead. Source: propagation of M ~ S D^2.
 */
export function hiMassFractionalError(fluxFraction: number, distanceFraction: number, scaleFraction = 0): number {
  if (![fluxFraction, distanceFraction, scaleFraction].every((x) => x >= 0 && Number.isFinite(x))) {
    throw new DomainError(
      `hiMassFractionalError: fractions must be >= 0, got ${fluxFraction}, ${distanceFraction}, ${scaleFraction}`,
    );
  }
  return Math.hypot(fluxFraction, 2 * distanceFraction, scaleFraction);
}

function check(name: string, amount: number, luminosityMpc: number, redshift: number): void {
  if (
    !(amount > 0 && luminosityMpc > 0 && redshift > -1) ||
    ![amount, luminosityMpc, redshift].every(Number.isFinite)
  ) {
    throw new DomainError(
      `${name}: flux or mass and distance must be positive and z > -1, got ${amount}, ${luminosityMpc}, ${redshift}`,
    );
  }
}
