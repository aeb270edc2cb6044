import { DomainError } from '../domain-error.ts';

/**
 * Likelihood ratio of a candidate: density of true counterparts over density of unrelated objects.
 *
 * @param offsetDensity positional density f, per square arcsec
 * @param counterpartDensity q(m), counterparts per detection and magnitude
 * @param backgroundDensity n(m), unrelated objects per square arcsec and magnitude, positive
 * @throws {DomainError} if the background is not positive
 *
 * Source: Sutherland & Saunders (1992), MNRAS 259, 413.
 */
export function likelihoodRatio(offsetDensity: number, counterpartDensity: number, backgroundDensity: number): number {
  if (!(backgroundDensity > 0)) throw new DomainError(`likelihoodRatio: background ${backgroundDensity}`);
  return (counterpartDensity * offsetDensity) / backgroundDensity;
}

/**
 * Probability of each candidate, and of none of them, given that there is at most one counterpart.
 *
 * @param ratios likelihood ratios of all candidates (q already carries Q0)
 * @param foundFraction Q0, share of detections whose counterpart is in the catalogue, below 1
 * @throws {DomainError} if Q0 is not in [0, 1)
 *
 * Source: Sutherland & Saunders (1992), eq. 5.
 */
export function reliabilities(ratios: readonly number[], foundFraction: number): { each: number[]; none: number } {
  if (!(foundFraction >= 0 && foundFraction < 1)) throw new DomainError(`reliabilities: Q0 is ${foundFraction}`);
  const sum = ratios.reduce((total, ratio) => total + ratio, 1 - foundFraction);
  return { each: ratios.map((ratio) => ratio / sum), none: (1 - foundFraction) / sum };
}

/**
 * Share of detections with a counterpart in the catalogue, from blank fields; free of the bias from clustering.
 *
 * @param blankReal share of detections with nothing inside the radius
 * @param blankRandom the same at random places, positive
 * @param shareInsideRadius F(r), share of true offsets inside the radius, positive
 * @throws {DomainError} if a divisor is not positive
 *
 * Source: 1 - Q0 F(r) = S_real / S_random; Fleuren et al. (2012), MNRAS 423, 2407 (from memory).
 */
export function foundFractionFromBlanks(blankReal: number, blankRandom: number, shareInsideRadius: number): number {
  if (!(blankRandom > 0 && shareInsideRadius > 0)) {
    throw new DomainError(`foundFractionFromBlanks: got ${blankRandom} random, F ${shareInsideRadius}`);
  }
  return (1 - blankReal / blankRandom) / shareInsideRadius;
}
