import { DomainError } from '../domain-error.ts';

const LANCZOS = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
  12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
];

/**
 * Natural logarithm of the gamma function.
 *
 * @param x positive argument
 * @returns ln Gamma(x), relative error about 1e-14
 * @throws {DomainError} if x is not positive
 *
 * Source: Lanczos approximation with g = 7, n = 9 (coefficients of P. Godfrey).
 */
export function logGamma(x: number): number {
  if (!(x > 0)) throw new DomainError(`logGamma: expected a positive number, got ${x}`);
  if (x < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * x)) - logGamma(1 - x);
  const shifted = x - 1;
  const sum = LANCZOS.reduce((total, c, k) => (k === 0 ? c : total + c / (shifted + k)), 0);
  const t = shifted + 7.5;
  return 0.5 * Math.log(2 * Math.PI) + (shifted + 0.5) * Math.log(t) - t + Math.log(sum);
}

/**
 * Regularised incomplete gamma functions.
 *
 * @param a shape, positive
 * @param x argument, not negative
 * @returns `lower` P(a, x) and `upper` Q(a, x), each computed without cancellation where it is the smaller
 * @throws {DomainError} if a or x is out of range
 *
 * Source: series below x = a + 1, continued fraction above (DLMF 8.11.4, 8.9.2; modified Lentz).
 */
export function incompleteGamma(a: number, x: number): { lower: number; upper: number } {
  if (!(a > 0 && x >= 0)) throw new DomainError(`incompleteGamma: expected a > 0 and x >= 0, got ${a}, ${x}`);
  if (x === 0) return { lower: 0, upper: 1 };
  if (x === Infinity) return { lower: 1, upper: 0 };
  const front = Math.exp(a * Math.log(x) - x - logGamma(a));
  if (x < a + 1) {
    let term = 1 / a;
    let sum = term;
    for (let n = 1; n < 10_000 && term > 1e-17 * sum; n++) {
      term *= x / (a + n);
      sum += term;
    }
    return { lower: front * sum, upper: 1 - front * sum };
  }
  const upper = front * upperFraction(a, x);
  return { lower: 1 - upper, upper };
}

/**
 * Upper incomplete gamma function, also for a shape of zero or below, as luminosity and mass functions need it.
 *
 * @param a shape, any finite number
 * @param x argument, positive
 * @returns Gamma(a, x), not regularised
 * @throws {DomainError} if a is not finite or x is not positive
 *
 * Source: recurrence Gamma(a, x) = (Gamma(a+1, x) - x^a e^-x) / a (DLMF 8.8.2); Gamma(0, x) is the exponential integral.
 */
export function upperIncompleteGamma(a: number, x: number): number {
  if (!(Number.isFinite(a) && x > 0)) throw new DomainError(`upperIncompleteGamma: got a ${a}, x ${x}`);
  if (a > 0) return incompleteGamma(a, x).upper * Math.exp(logGamma(a));
  // The recurrence cancels for large x, where the continued fraction holds for every a.
  if (x > 1.5) return Math.exp(a * Math.log(x) - x) * upperFraction(a, x);
  if (a === 0) return exponentialIntegral(x);
  return (upperIncompleteGamma(a + 1, x) - x ** a * Math.exp(-x)) / a;
}

function upperFraction(a: number, x: number): number {
  const tiny = 1e-300;
  let b = x + 1 - a;
  let c = 1 / tiny;
  let d = 1 / b;
  let h = d;
  for (let n = 1; n < 10_000; n++) {
    const an = -n * (n - a);
    b += 2;
    d = an * d + b;
    if (Math.abs(d) < tiny) d = tiny;
    c = b + an / c;
    if (Math.abs(c) < tiny) c = tiny;
    d = 1 / d;
    h *= d * c;
    if (Math.abs(d * c - 1) < 1e-16) break;
  }
  return h;
}

function exponentialIntegral(x: number): number {
  let term = 1;
  let sum = 0;
  for (let n = 1; n < 60; n++) {
    term *= -x / n;
    sum -= term / n;
  }
  return sum - Math.log(x) - 0.5772156649015329;
}
