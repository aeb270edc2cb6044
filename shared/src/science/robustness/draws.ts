import { DomainError } from '../domain-error.ts';
import { wilsonInterval } from './intervals.ts';
import { normalQuantile } from './normal-quantile.ts';

/** Draws of what the score holds fixed: standard error 0.011 at p = 0.5; up to the cap where a verdict is borderline. */
export const DEFAULT_DRAWS = 2000;
export const MAXIMUM_DRAWS = 10_000;

/**
 * Standard error of a probability from draws.
 *
 * @param probability true probability, in [0, 1]
 * @param draws number of draws, positive
 * @returns sqrt(p (1 - p) / N); for the screen give a Wilson interval instead
 * @throws {DomainError} if an input is out of range
 */
export function drawError(probability: number, draws: number): number {
  check(probability, draws);
  return Math.sqrt((probability * (1 - probability)) / draws);
}

/**
 * Draws needed for a standard error.
 *
 * @param probability true probability, in [0, 1]
 * @param error standard error wanted, positive
 * @returns number of draws, not rounded
 * @throws {DomainError} if an input is out of range
 */
export function drawsForError(probability: number, error: number): number {
  check(probability, error);
  return (probability * (1 - probability)) / error ** 2;
}

/**
 * Draws needed for the half-width of an interval, normal approximation.
 *
 * @param probability true probability, in [0, 1]
 * @param halfWidth half-width wanted, positive
 * @param level probability content, in (0, 1)
 * @returns number of draws, not rounded
 * @throws {DomainError} if an input is out of range
 */
export function drawsForHalfWidth(probability: number, halfWidth: number, level = 0.95): number {
  return drawsForError(probability, halfWidth / normalQuantile(0.5 + level / 2));
}

/**
 * Upper limit of a probability that was never met.
 *
 * @param draws number of draws, positive
 * @param level one-sided confidence, in (0, 1)
 * @returns 1 - (1 - level)^(1/N), about 3/N at 95 per cent; so 200 draws never prove a certainty
 * @throws {DomainError} if an input is out of range
 */
export function neverMetLimit(draws: number, level = 0.95): number {
  check(level, draws);
  return -Math.expm1(Math.log1p(-level) / draws);
}

/**
 * Whether more draws are worth their time.
 *
 * @param successes draws that support the verdict so far
 * @param draws draws so far
 * @param cut value the fraction is compared with
 * @param maximum cap
 * @returns draws to reach: twice as many while the 95 per cent interval straddles the cut, else as many as now
 * @throws {DomainError} if the counts are out of range
 */
export function nextDraws(successes: number, draws: number, cut: number, maximum = MAXIMUM_DRAWS): number {
  const { low, high } = wilsonInterval(successes, draws);
  return low < cut && cut < high ? Math.max(draws, Math.min(2 * draws, maximum)) : draws;
}

function check(probability: number, positive: number): void {
  if (!(probability >= 0 && probability <= 1 && positive > 0)) {
    throw new DomainError(`draws: expected a probability and a positive number, got ${probability}, ${positive}`);
  }
}
