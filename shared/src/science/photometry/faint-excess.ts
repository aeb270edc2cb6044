import { DomainError } from '../domain-error.ts';
import { incompleteBeta } from '../robustness/incomplete-beta.ts';

/**
 * Chance of so many objects inside a circle, or more, if they are spread as in the ring about it.
 *
 * @param inside objects inside the circle
 * @param ring objects in the ring
 * @param areaRatio area of the ring over that of the circle, positive
 * @returns probability in [0, 1]; 1 for none inside
 * @throws {DomainError} if an input is out of range
 *
 * A large galaxy of low surface brightness stands in catalogues as several faint pieces. Of all objects together a share
 * 1 / (1 + ratio) falls inside by chance: binomial, exact, and free of the density, which differs from place to place.
 *
 * Method: absence.
 */
export function crowdingChance(inside: number, ring: number, areaRatio: number): number {
  if (!(inside >= 0 && ring >= 0 && areaRatio > 0)) {
    throw new DomainError(`crowdingChance: ${inside} inside, ${ring} in a ring of ${areaRatio} times the area`);
  }
  if (inside === 0) return 1;
  return incompleteBeta(inside, ring + 1, 1 / (1 + areaRatio));
}
