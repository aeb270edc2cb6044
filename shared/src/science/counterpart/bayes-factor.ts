import { ARCSECOND } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/**
 * Natural logarithm of the Bayes factor that two positions are one source rather than two unrelated ones.
 *
 * @param separationArcsec separation, arcsec
 * @param sigma1Arcsec 1-D error of one, arcsec
 * @param sigma2Arcsec 1-D error of the other, arcsec
 * @throws {DomainError} if both errors are zero
 *
 * Source: Budavari & Szalay (2008), ApJ 679, 301, eq. 16; small angles.
 */
export function logBayesFactorOfTwo(separationArcsec: number, sigma1Arcsec: number, sigma2Arcsec: number): number {
  const variance = (sigma1Arcsec ** 2 + sigma2Arcsec ** 2) * ARCSECOND ** 2;
  if (!(variance > 0)) throw new DomainError(`bayesFactor: errors ${sigma1Arcsec} and ${sigma2Arcsec} arcsec`);
  return Math.log(2 / variance) - (separationArcsec * ARCSECOND) ** 2 / (2 * variance);
}

/** A position on the tangent plane with its 1-D error, arcsec. */
export interface MeasuredPosition {
  eastArcsec: number;
  northArcsec: number;
  sigmaArcsec: number;
}

/**
 * Natural logarithm of the Bayes factor that n positions, one a catalogue, are one source.
 *
 * @param positions at least two
 * @throws {DomainError} for fewer than two, or an error that is not positive
 *
 * Source: Budavari & Szalay (2008), eq. 18.
 */
export function logBayesFactor(positions: readonly MeasuredPosition[]): number {
  if (positions.length < 2) throw new DomainError(`bayesFactor: needs two positions, got ${positions.length}`);
  let sumWeights = 0;
  let sumLogs = 0;
  for (const { sigmaArcsec } of positions) {
    if (!(sigmaArcsec > 0)) throw new DomainError(`bayesFactor: error must be positive, got ${sigmaArcsec} arcsec`);
    const weight = 1 / (sigmaArcsec * ARCSECOND) ** 2;
    sumWeights += weight;
    sumLogs += Math.log(weight);
  }
  let scatter = 0;
  for (let i = 0; i < positions.length; i++) {
    for (let j = 0; j < i; j++) {
      const a = positions[i]!;
      const b = positions[j]!;
      const apart = (a.eastArcsec - b.eastArcsec) ** 2 + (a.northArcsec - b.northArcsec) ** 2;
      scatter += apart / (a.sigmaArcsec ** 2 * b.sigmaArcsec ** 2 * ARCSECOND ** 2);
    }
  }
  return (positions.length - 1) * Math.LN2 + sumLogs - Math.log(sumWeights) - scatter / (2 * sumWeights);
}

/** Prior of a pair: expected true matches over all pairs, both as full-sky-equivalent numbers. */
export function pairPrior(trueMatches: number, firstCount: number, secondCount: number): number {
  return trueMatches / (firstCount * secondCount);
}

/**
 * Posterior of one pair against "not this pair"; it does not know that a source has at most one counterpart, so it is
 * shown for reference only.
 *
 * @param logFactor natural logarithm of the Bayes factor
 * @param prior prior probability of the pair
 * @throws {DomainError} if the prior is not between 0 and 1
 */
export function pairPosterior(logFactor: number, prior: number): number {
  if (!(prior > 0 && prior < 1)) throw new DomainError(`pairPosterior: prior must lie in (0, 1), got ${prior}`);
  return 1 / (1 + (1 - prior) / (prior * Math.exp(logFactor)));
}

/** Square arcsec in the whole sky: the number density times this is the full-sky-equivalent number. */
export const SKY_SQUARE_ARCSEC = (4 * Math.PI) / ARCSECOND ** 2;
