import { DomainError } from '../domain-error.ts';
import { poissonInterval } from './intervals.ts';
import type { Interval } from './intervals.ts';

/** Fraction of control positions that found a match, its Poisson error and its exact 68.27 per cent interval. */
export interface ChanceFraction {
  fraction: number;
  error: number;
  interval: Interval;
}

/**
 * How often chance alone makes a match.
 *
 * @param matched control positions with a match
 * @param positions control positions kept (dropped ones do not count)
 * @returns fraction, error sqrt(k)/N and exact interval (Garwood); at k = 0 quote the interval
 * @throws {DomainError} if there are no positions or more matches than positions
 *
 * Method: control.
 */
export function chanceFraction(matched: number, positions: number): ChanceFraction {
  if (!(positions > 0 && matched >= 0 && matched <= positions)) {
    throw new DomainError(`chanceFraction: got ${matched} matches at ${positions} positions`);
  }
  const { low, high } = poissonInterval(matched);
  return {
    fraction: matched / positions,
    error: Math.sqrt(matched) / positions,
    interval: { low: low / positions, high: Math.min(1, high / positions) },
  };
}

/** What the control says of a list. */
export interface CorrectedCounts {
  /** Fraction of sources with a true match, and its error; negative where chance explains more than was found. */
  trueFraction: number;
  trueFractionError: number;
  /** Sources truly without a counterpart in these catalogues, and how many of them hide behind a chance match. */
  withoutCounterpart: number;
  hiddenByChance: number;
}

/**
 * Corrects a count of matches, and of absences, for chance.
 *
 * @param matched sources with a match
 * @param sources all sources
 * @param chance chance fraction from the control, in [0, 1)
 * @returns true fraction, and the number of absences: unmatched sources are always too few
 * @throws {DomainError} if an input is out of range
 *
 * Source: (f_obs - f_ch) / (1 - f_ch), binomial error of f_obs over 1 - f_ch; the error of f_ch itself is left out.
 *
 * Method: control.
 */
export function correctedCounts(matched: number, sources: number, chance: number): CorrectedCounts {
  if (!(sources > 0 && matched >= 0 && matched <= sources && chance >= 0 && chance < 1)) {
    throw new DomainError(`correctedCounts: got ${matched} of ${sources}, chance ${chance}`);
  }
  const observed = matched / sources;
  const withoutCounterpart = (sources - matched) / (1 - chance);
  return {
    trueFraction: (observed - chance) / (1 - chance),
    trueFractionError: Math.sqrt((observed * (1 - observed)) / sources) / (1 - chance),
    withoutCounterpart,
    hiddenByChance: withoutCounterpart - (sources - matched),
  };
}

/**
 * Chance of at least one unrelated object in a circle, without a control: a check on it.
 *
 * @param perSquareDegree surface density, per square degree, not negative
 * @param radiusArcsec radius, arcsec, not negative
 * @returns mean number and probability of at least one; clustering makes the true one larger
 * @throws {DomainError} if an input is negative or not finite
 */
export function chanceAlignment(perSquareDegree: number, radiusArcsec: number): { mean: number; probability: number } {
  if (![perSquareDegree, radiusArcsec].every((x) => x >= 0 && Number.isFinite(x))) {
    throw new DomainError(`chanceAlignment: got ${perSquareDegree} per square degree, ${radiusArcsec} arcsec`);
  }
  const mean = Math.PI * (radiusArcsec / 3600) ** 2 * perSquareDegree;
  return { mean, probability: -Math.expm1(-mean) };
}

/** Published counts of HI sources without an optical counterpart. */
export const PUBLISHED_BASE_RATES = [
  {
    survey: 'WALLABY pilot',
    sources: 1829,
    dark: 55,
    reliable: 38,
    tidal: 13,
    isolated: 25,
    source: "O'Beirne et al. (2025), PASA",
  },
  {
    survey: 'ALFALFA',
    sources: 31_500,
    dark: 344,
    isolated: 142,
    tidal: 83,
    source: 'Kwon et al. (2025), ApJS 279, 38; Haynes et al. (2018)',
  },
] as const;
