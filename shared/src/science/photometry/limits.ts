import { DomainError } from '../domain-error.ts';

/**
 * Absolute magnitude of an apparent one.
 *
 * @param magnitude apparent magnitude or limit
 * @param extinctionMag Galactic extinction in the band, mag
 * @param luminosityMpc luminosity distance, Mpc, positive
 * @returns absolute magnitude in the same system; no K-correction (negligible under z = 0.05)
 * @throws {DomainError} if the distance is not positive or an input is not finite
 */
export function absoluteMagnitude(magnitude: number, extinctionMag: number, luminosityMpc: number): number {
  if (!(luminosityMpc > 0) || ![magnitude, extinctionMag, luminosityMpc].every(Number.isFinite)) {
    throw new DomainError(`absoluteMagnitude: got m ${magnitude}, A ${extinctionMag}, D ${luminosityMpc} Mpc`);
  }
  return magnitude - extinctionMag - 5 * Math.log10(luminosityMpc) - 25;
}

/**
 * Luminosity in one band.
 *
 * @param absolute absolute magnitude
 * @param solar absolute magnitude of the Sun in the same band and the same system
 * @returns luminosity, solar luminosities of that band
 */
export function luminosity(absolute: number, solar: number): number {
  return 10 ** (-0.4 * (absolute - solar));
}

/** What a magnitude limit says in physical terms; all are upper limits on the light. */
export interface PhysicalLimit {
  absoluteMag: number;
  luminositySolar: number;
  stellarMassSolar: number;
}

/**
 * Physical meaning of a magnitude limit: the depth must be the extended-source one of the size assumed.
 *
 * @param magnitude limiting magnitude
 * @param extinctionMag extinction in the band, mag
 * @param luminosityMpc luminosity distance, Mpc
 * @param solar absolute magnitude of the Sun, same band and system
 * @param massToLight stellar mass over luminosity, solar units, positive (see `MASS_TO_LIGHT`)
 * @returns absolute magnitude, luminosity and stellar mass at the limit
 * @throws {DomainError} if an input is out of range
 *
 * Method: limits.
 */
export function physicalLimit(
  magnitude: number,
  extinctionMag: number,
  luminosityMpc: number,
  solar: number,
  massToLight: number,
): PhysicalLimit {
  if (!(massToLight > 0)) throw new DomainError(`physicalLimit: M/L must be positive, got ${massToLight}`);
  const absoluteMag = absoluteMagnitude(magnitude, extinctionMag, luminosityMpc);
  const luminositySolar = luminosity(absoluteMag, solar);
  return { absoluteMag, luminositySolar, stellarMassSolar: massToLight * luminositySolar };
}

/** Mass-to-light ratios for limits: two in r (young and blue, conservative), one in Ks and W1 (old disc). Common practice. */
export const MASS_TO_LIGHT = { rYoung: 0.5, rConservative: 1, ks: 0.6, w1: 0.6 } as const;
