import { DomainError } from '../domain-error.ts';

/**
 * Probability that an unrelated object at least as bright lies at least as near, corrected for having looked at all
 * objects inside the search radius.
 *
 * @param separationArcsec separation of the candidate, arcsec
 * @param brighterDensity objects at least as bright, per square arcsec
 * @param searchArcsec search radius, arcsec
 * @param limitDensity all objects of the catalogue, per square arcsec
 * @returns probability; small supports the association, but it is no posterior
 * @throws {DomainError} if an input is negative or not finite
 *
 * Source: Downes et al. (1986), MNRAS 218, 31.
 */
export function chanceProbability(
  separationArcsec: number,
  brighterDensity: number,
  searchArcsec: number,
  limitDensity: number,
): number {
  if (!(separationArcsec >= 0 && brighterDensity >= 0 && searchArcsec >= 0 && limitDensity >= 0)) {
    throw new DomainError(
      `chanceProbability: got r ${separationArcsec}, N ${brighterDensity}, r_s ${searchArcsec}, N_lim ${limitDensity}`,
    );
  }
  const alone = Math.PI * separationArcsec ** 2 * brighterDensity;
  const all = Math.PI * searchArcsec ** 2 * limitDensity;
  const expected = alone >= all || alone === 0 ? alone : alone * (1 + Math.log(all / alone));
  return -Math.expm1(-expected);
}
