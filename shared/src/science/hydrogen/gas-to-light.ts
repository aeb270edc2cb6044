import { DomainError } from '../domain-error.ts';
import { HI_MASS_CONSTANT } from './hi-mass-constant.ts';

/** A ratio together with what it is: where the light is only an upper limit the ratio is a lower one, printed with ">". */
export interface GasToLight {
  ratio: number;
  bound: 'value' | 'lower limit';
}

/**
 * HI mass per unit of light or of stellar mass.
 *
 * @param hiMassSolar HI mass, solar masses, positive
 * @param lightSolar luminosity (or stellar mass) in solar units, positive, at the same distance as the mass
 * @param isLimit true where the light is an upper limit
 * @returns ratio in solar units, free of distance, with its kind
 * @throws {DomainError} if an input is not positive
 *
 * Method: gas-to-light.
 */
export function gasToLight(hiMassSolar: number, lightSolar: number, isLimit: boolean): GasToLight {
  if (!(hiMassSolar > 0 && lightSolar > 0)) {
    throw new DomainError(`gasToLight: mass and light must be positive, got ${hiMassSolar}, ${lightSolar}`);
  }
  return { ratio: hiMassSolar / lightSolar, bound: isLimit ? 'lower limit' : 'value' };
}

/**
 * The same ratio straight from flux and magnitude: it needs no distance.
 *
 * @param fluxJyKms HI flux, Jy km/s, positive
 * @param magnitude apparent magnitude corrected for extinction
 * @param solarMagnitude absolute magnitude of the Sun in the same band and system
 * @param isLimit true where the magnitude is a limit
 * @param redshift redshift of a flux in optical velocity, > -1; 0 gives the local form
 * @returns ratio in solar units, with its kind
 * @throws {DomainError} if an input is out of range
 *
 * Source: 2.356e5 D^2 S / (1+z)^2 over 10^{-0.4 (m - 5 log D - 25 - M_sun)}, in which D cancels.
 */
export function gasToLightFromFlux(
  fluxJyKms: number,
  magnitude: number,
  solarMagnitude: number,
  isLimit: boolean,
  redshift = 0,
): GasToLight {
  const lightAtOneMpc = 10 ** (-0.4 * (magnitude - 25 - solarMagnitude));
  return gasToLight((HI_MASS_CONSTANT * fluxJyKms) / (1 + redshift) ** 2, lightAtOneMpc, isLimit);
}
