import { DomainError } from '../domain-error.ts';
import { incompleteGamma } from './gamma-function.ts';
import { incompleteBeta } from './incomplete-beta.ts';
import { normalQuantile } from './normal-quantile.ts';

/** Interval of a rate or a fraction. */
export interface Interval {
  low: number;
  high: number;
}

/** Probability inside one standard deviation of a normal deviate, 68.27 per cent. */
export const ONE_SIGMA = 0.682689492137086;

/**
 * Wilson interval of a fraction: close to exact, and sensible at 0 and 1.
 *
 * @param successes number of successes, an integer in [0, trials]
 * @param trials number of trials, a positive integer
 * @param level probability content, in (0, 1)
 * @returns interval in [0, 1]
 * @throws {DomainError} if an input is out of range
 *
 * Source: Wilson (1927), J. Am. Stat. Assoc. 22, 209.
 *
 * Method: stability.
 */
export function wilsonInterval(successes: number, trials: number, level = 0.95): Interval {
  checkFraction('wilsonInterval', successes, trials, level);
  const z = normalQuantile(0.5 + level / 2);
  const p = successes / trials;
  const denominator = 1 + z ** 2 / trials;
  const centre = (p + z ** 2 / (2 * trials)) / denominator;
  const half = (z / denominator) * Math.sqrt((p * (1 - p)) / trials + z ** 2 / (4 * trials ** 2));
  return {
    low: successes === 0 ? 0 : Math.max(0, centre - half),
    high: successes === trials ? 1 : Math.min(1, centre + half),
  };
}

/**
 * Exact interval of a fraction: never covers less than its level, so it is wide for small numbers.
 *
 * @param successes number of successes, an integer in [0, trials]
 * @param trials number of trials, a positive integer
 * @param level probability content, in (0, 1)
 * @returns interval in [0, 1]
 * @throws {DomainError} if an input is out of range
 *
 * Source: Clopper & Pearson (1934), Biometrika 26, 404.
 */
export function clopperPearsonInterval(successes: number, trials: number, level = 0.95): Interval {
  checkFraction('clopperPearsonInterval', successes, trials, level);
  const tail = (1 - level) / 2;
  const failures = trials - successes;
  return {
    low: successes === 0 ? 0 : solve((p) => incompleteBeta(successes, failures + 1, p) - tail, 0, 1),
    high: failures === 0 ? 1 : solve((p) => incompleteBeta(successes + 1, failures, p) - (1 - tail), 0, 1),
  };
}

/**
 * Exact central interval of a Poisson mean.
 *
 * @param count number counted, an integer >= 0
 * @param level probability content, in (0, 1)
 * @returns interval of the mean; the lower end of a count of 0 is 0
 * @throws {DomainError} if an input is out of range
 *
 * Source: Garwood (1936), Biometrika 28, 437; Gehrels (1986), ApJ 303, 336.
 */
export function poissonInterval(count: number, level = ONE_SIGMA): Interval {
  if (!(Number.isInteger(count) && count >= 0))
    throw new DomainError(`poissonInterval: count must be an integer >= 0, got ${count}`);
  checkLevel('poissonInterval', level);
  const tail = (1 - level) / 2;
  const far = count + 10 + 40 * Math.sqrt(count + 10);
  return {
    low: count === 0 ? 0 : solve((mean) => incompleteGamma(count, mean).lower - tail, 0, count),
    high: solve((mean) => tail - incompleteGamma(count + 1, mean).upper, count, far),
  };
}

/** Root of an increasing function between two ends, by halving to the last bit. */
function solve(f: (x: number) => number, from: number, to: number): number {
  let low = from;
  let high = to;
  for (let k = 0; k < 200; k++) {
    const middle = 0.5 * (low + high);
    if (middle === low || middle === high) break;
    if (f(middle) < 0) low = middle;
    else high = middle;
  }
  return 0.5 * (low + high);
}

function checkFraction(name: string, successes: number, trials: number, level: number): void {
  const whole = Number.isInteger(successes) && Number.isInteger(trials);
  if (!(whole && trials > 0 && successes >= 0 && successes <= trials)) {
    throw new DomainError(`${name}: expected integers 0 <= successes <= trials, got ${successes} of ${trials}`);
  }
  checkLevel(name, level);
}

function checkLevel(name: string, level: number): void {
  if (!(level > 0 && level < 1)) throw new DomainError(`${name}: level must lie in (0, 1), got ${level}`);
}
