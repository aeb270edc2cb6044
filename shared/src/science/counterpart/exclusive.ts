import { DomainError } from '../domain-error.ts';

/** Hypotheses of one detection, mutually exclusive; with the objects they add to one. */
export interface Hypotheses {
  /** No stars above the stated limit. */
  none: number;
  /** A counterpart exists, but these catalogues could not show it. */
  missed: number;
  /** The line itself is not real. */
  spurious: number;
  /** Each object is the counterpart. */
  objects: number[];
}

/**
 * Probabilities of a detection's hypotheses.
 *
 * @param weights X_j of the objects for prior one: density of counterparts over density of unrelated objects, times
 *   magnitude and velocity factors (the prior is multiplied in here)
 * @param prior Q, share of such detections that have a galaxy of stars, in (0, 1)
 * @param completeness c, chance that the ordinary counterpart would have been seen here, in [0, 1]
 * @param reliability R, chance that the line is real, in [0, 1]
 * @throws {DomainError} if an input is out of range
 *
 * P(none) = R (1 - Q) / S, P(missed) = R Q (1 - c) / S, P(j) = R X_j / S, P(spurious) = (1 - R) / S. With c = 1 and R = 1
 * it is Sutherland & Saunders (1992) with a velocity term; with no object it is Bayes' theorem for a silence.
 *
 * Method: counterpart, reliability.
 */
export function exclusiveProbabilities(
  weights: readonly number[],
  prior: number,
  completeness: number,
  reliability = 1,
): Hypotheses {
  if (!(prior > 0 && prior < 1) || !within(completeness) || !within(reliability)) {
    throw new DomainError(`exclusiveProbabilities: Q ${prior}, c ${completeness}, R ${reliability}`);
  }
  let found = 0;
  for (const weight of weights) {
    if (!(weight >= 0)) throw new DomainError(`exclusiveProbabilities: weight ${weight}`);
    found += prior * weight;
  }
  const none = reliability * (1 - prior);
  const missed = reliability * prior * (1 - completeness);
  const spurious = 1 - reliability;
  const sum = none + missed + spurious + reliability * found;
  return {
    none: none / sum,
    missed: missed / sum,
    spurious: spurious / sum,
    objects: weights.map((weight) => (reliability * prior * weight) / sum),
  };
}

const within = (x: number): boolean => x >= 0 && x <= 1;

/** Chance that a detection with nothing found still has a counterpart: Q (1 - c) / (Q (1 - c) + 1 - Q). */
export function missedProbability(prior: number, completeness: number): number {
  return exclusiveProbabilities([], prior, completeness).missed;
}

/** Effective completeness of a search: the four chances that must all hold. */
export function effectiveCompleteness(
  insideRadius: number,
  covered: number,
  unmasked: number,
  detected: number,
): number {
  return insideRadius * covered * unmasked * detected;
}
