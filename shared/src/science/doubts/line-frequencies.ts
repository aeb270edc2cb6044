import { HI_REST_FREQUENCY_MHZ, SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/** Main and satellite lines of hydroxyl, MHz. */
export const HYDROXYL_MHZ = {
  main1667: 1667.35903,
  main1665: 1665.4018,
  satellite1612: 1612.231,
  satellite1720: 1720.53,
};

/** Beyond z = 1000 there is no line to see. */
const HIGHEST_CZ_KMS = 1000 * SPEED_OF_LIGHT_KMS;

/** Rydberg frequency of hydrogen, R_inf c / (1 + m_e / m_p), MHz (CODATA 2018). */
export const RYDBERG_HYDROGEN_MHZ = 3.2898419602508e9 / (1 + 5.44617021487e-4);

/**
 * Optical cz at which a line would be read if it were HI.
 *
 * @param observedMhz observed frequency, MHz, positive
 * @returns cz, km/s
 * @throws {DomainError} if the frequency is not positive
 */
export function czIfHydrogen(observedMhz: number): number {
  if (!(observedMhz > 0)) throw new DomainError(`czIfHydrogen: frequency must be positive, got ${observedMhz} MHz`);
  return SPEED_OF_LIGHT_KMS * (HI_REST_FREQUENCY_MHZ / observedMhz - 1);
}

/**
 * Frequency at which HI of an optical cz is observed.
 *
 * @param czKms optical cz, km/s, above -c
 * @returns frequency, MHz
 * @throws {DomainError} if cz is not above -c or no redshift of this universe
 */
export function hydrogenFrequency(czKms: number): number {
  if (!(czKms > -SPEED_OF_LIGHT_KMS && czKms < HIGHEST_CZ_KMS)) {
    throw new DomainError(`hydrogenFrequency: cz must lie above -c and below z = 1000, got ${czKms} km/s`);
  }
  return HI_REST_FREQUENCY_MHZ / (1 + czKms / SPEED_OF_LIGHT_KMS);
}

/**
 * Redshift of a line read as HI if it is another line.
 *
 * @param restMhz rest frequency of the other line, MHz
 * @param redshift redshift under which it was read as HI
 * @returns redshift of the other line: (f / f_HI)(1 + z) - 1
 */
export function redshiftIfLine(restMhz: number, redshift: number): number {
  return (restMhz / HI_REST_FREQUENCY_MHZ) * (1 + redshift) - 1;
}

/**
 * Rest frequency of a hydrogen recombination line Hn-alpha.
 *
 * @param n lower level, a positive integer
 * @returns frequency of the transition n+1 to n, MHz
 * @throws {DomainError} if n is not a positive integer
 */
export function recombinationFrequency(n: number): number {
  if (!(Number.isInteger(n) && n > 0))
    throw new DomainError(`recombinationFrequency: n must be a positive integer, got ${n}`);
  return RYDBERG_HYDROGEN_MHZ * (1 / n ** 2 - 1 / (n + 1) ** 2);
}
