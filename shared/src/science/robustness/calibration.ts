import { DomainError } from '../domain-error.ts';
import { wilsonInterval } from './intervals.ts';
import type { Interval } from './intervals.ts';

/** One bin of a calibration plot. */
export interface CalibrationBin {
  from: number;
  to: number;
  count: number;
  /** Mean probability claimed by the sources in the bin, NaN where it is empty. */
  claimed: number;
  /** Fraction of them that turned out true, NaN where it is empty, and its Wilson interval. */
  found: number;
  interval: Interval;
}

/**
 * Compares claimed probabilities with the truth.
 *
 * @param claimed probabilities, in [0, 1]
 * @param truth whether each was so, same order
 * @param bins number of equal bins; 1 falls in the last
 * @param level probability content of the intervals
 * @returns the bins; a method is calibrated where the interval of `found` holds `claimed`
 * @throws {DomainError} if the lengths differ or a probability is outside 0-1
 */
export function calibrationBins(
  claimed: ArrayLike<number>,
  truth: ArrayLike<boolean>,
  bins = 10,
  level = 0.95,
): CalibrationBin[] {
  check(claimed, truth);
  const sums = Array.from({ length: bins }, () => ({ count: 0, claimed: 0, found: 0 }));
  for (let i = 0; i < claimed.length; i++) {
    const bin = sums[Math.min(bins - 1, Math.floor(claimed[i]! * bins))]!;
    bin.count++;
    bin.claimed += claimed[i]!;
    if (truth[i]) bin.found++;
  }
  return sums.map(({ count, claimed: sum, found }, k) => ({
    from: k / bins,
    to: (k + 1) / bins,
    count,
    claimed: count > 0 ? sum / count : NaN,
    found: count > 0 ? found / count : NaN,
    interval: count > 0 ? wilsonInterval(found, count, level) : { low: 0, high: 1 },
  }));
}

/**
 * Area under the curve of true against false positives: the chance that a true source ranks above a false one.
 *
 * @param score ranking score, larger for more likely true; ties count half
 * @param truth whether each is true
 * @returns area in [0, 1]; NaN where one of the classes is empty
 * @throws {DomainError} if the lengths differ or a score is NaN
 *
 * Source: rank sum of Mann & Whitney (1947).
 */
export function areaUnderCurve(score: ArrayLike<number>, truth: ArrayLike<boolean>): number {
  if (score.length !== truth.length)
    throw new DomainError(`areaUnderCurve: ${score.length} scores, ${truth.length} truths`);
  const order = Array.from({ length: score.length }, (_, i) => i).sort((a, b) => score[a]! - score[b]!);
  let rankSum = 0;
  let positives = 0;
  for (let from = 0; from < order.length;) {
    const value = score[order[from]!]!;
    if (Number.isNaN(value)) throw new DomainError('areaUnderCurve: a score is NaN');
    let to = from;
    while (to < order.length && score[order[to]!]! === value) to++;
    const rank = (from + 1 + to) / 2;
    for (let k = from; k < to; k++) {
      if (!truth[order[k]!]) continue;
      rankSum += rank;
      positives++;
    }
    from = Math.max(to, from + 1);
  }
  const negatives = order.length - positives;
  return positives > 0 && negatives > 0 ? (rankSum - (positives * (positives + 1)) / 2) / (positives * negatives) : NaN;
}

function check(claimed: ArrayLike<number>, truth: ArrayLike<boolean>): void {
  if (claimed.length !== truth.length) {
    throw new DomainError(`calibrationBins: ${claimed.length} probabilities, ${truth.length} truths`);
  }
  for (let i = 0; i < claimed.length; i++) {
    if (!(claimed[i]! >= 0 && claimed[i]! <= 1)) {
      throw new DomainError(`calibrationBins: probability ${i} is ${claimed[i]}, outside 0-1`);
    }
  }
}
