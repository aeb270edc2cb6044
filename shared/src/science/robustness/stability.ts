import { DomainError } from '../domain-error.ts';
import { DEFAULT_DRAWS, MAXIMUM_DRAWS, nextDraws } from './draws.ts';
import { wilsonInterval } from './intervals.ts';
import type { Interval } from './intervals.ts';

/** How often a verdict stands. It is called stability, for it is no probability of being right. */
export interface Stability<V extends string> {
  draws: number;
  /** Draws that gave each verdict. */
  counts: Map<V, number>;
  /** Fraction that gave the nominal one, and its 95 per cent Wilson interval; never quoted as 1.000 without it. */
  agreement: number;
  interval: Interval;
}

/**
 * Repeats a verdict over draws, more of them while the answer is near the cut.
 *
 * @param nominal verdict of the nominal run
 * @param verdictOf verdict of draw k, from the same code as the nominal run; called once for k = 0, 1, 2 ...
 * @param options draws to begin with, cap, and the cut the agreement is compared with
 * @returns tally, agreement and interval
 * @throws {DomainError} if the number of draws is not a positive integer
 *
 * Method: stability.
 */
export function stability<V extends string>(
  nominal: V,
  verdictOf: (draw: number) => V,
  options: { draws?: number; maximum?: number; cut?: number } = {},
): Stability<V> {
  const { draws = DEFAULT_DRAWS, maximum = MAXIMUM_DRAWS, cut = 0.8 } = options;
  if (!(Number.isInteger(draws) && draws > 0)) throw new DomainError(`stability: got ${draws} draws`);
  const counts = new Map<V, number>();
  let done = 0;
  let goal = draws;
  while (done < goal) {
    for (; done < goal; done++) {
      const verdict = verdictOf(done);
      counts.set(verdict, (counts.get(verdict) ?? 0) + 1);
    }
    goal = nextDraws(counts.get(nominal) ?? 0, done, cut, maximum);
  }
  const agreeing = counts.get(nominal) ?? 0;
  return { draws: done, counts, agreement: agreeing / done, interval: wilsonInterval(agreeing, done) };
}

/** Where a verdict changes as one input moves away from its nominal value. */
export interface Flip<V extends string> {
  value: number;
  verdict: V;
}

/**
 * Smallest change of one input that flips a verdict ("would be accompanied if nearer than 21 Mpc").
 *
 * @param nominal nominal value of the input, inside the range
 * @param range values that are still reasonable
 * @param verdictOf verdict at a value of the input
 * @param steps values looked at on each side; a verdict that flips and returns between two of them is missed
 * @returns flips below and above, to a thousandth of a step, undefined where the verdict stands throughout
 * @throws {DomainError} if the nominal value is outside the range
 */
export function flips<V extends string>(
  nominal: number,
  range: Interval,
  verdictOf: (value: number) => V,
  steps = 40,
): { below?: Flip<V>; above?: Flip<V> } {
  if (!(range.low <= nominal && nominal <= range.high)) {
    throw new DomainError(`flips: ${nominal} is outside ${range.low} to ${range.high}`);
  }
  const verdict = verdictOf(nominal);
  const result: { below?: Flip<V>; above?: Flip<V> } = {};
  for (const [side, end] of [
    ['below', range.low],
    ['above', range.high],
  ] as const) {
    let stands = nominal;
    for (let k = 1; k <= steps && end !== nominal; k++) {
      const value = nominal + ((end - nominal) * k) / steps;
      if (verdictOf(value) === verdict) {
        stands = value;
        continue;
      }
      let changed = value;
      for (let halving = 0; halving < 10; halving++) {
        const middle = 0.5 * (stands + changed);
        if (verdictOf(middle) === verdict) stands = middle;
        else changed = middle;
      }
      result[side] = { value: changed, verdict: verdictOf(changed) };
      break;
    }
  }
  return result;
}
