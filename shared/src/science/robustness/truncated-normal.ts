import { DomainError } from '../domain-error.ts';
import { normalCdf } from './error-function.ts';
import { normalQuantile } from './normal-quantile.ts';
import type { Random } from './random.ts';

/**
 * Normal deviate that is kept above a limit, by leaving out what lies below and never by clipping.
 *
 * @param random generator; exactly one uniform deviate is used, so that draws stay in step
 * @param mean mean before truncation
 * @param sigma standard deviation before truncation, not negative; 0 gives the mean
 * @param least lower limit, below the mean
 * @returns deviate above `least`
 * @throws {DomainError} if the mean is not above the limit or an input is not finite
 */
export function truncatedNormal(random: Random, mean: number, sigma: number, least: number): number {
  if (!(mean > least && sigma >= 0 && Number.isFinite(mean) && Number.isFinite(sigma))) {
    throw new DomainError(`truncatedNormal: got mean ${mean}, sigma ${sigma}, limit ${least}`);
  }
  const u = random.uniform();
  if (sigma === 0) return mean;
  const below = normalCdf((least - mean) / sigma);
  // Half a step off zero, which has no quantile.
  const probability = below + (1 - below) * Math.max(u, 2 ** -54);
  return probability < 1 ? Math.max(least, mean + sigma * normalQuantile(probability)) : mean + 8.3 * sigma;
}
