import type { Random } from '../robustness/random.ts';

/**
 * Correlation of neighbouring channels outside the line.
 *
 * @returns 0 to 0.9; 0 unless it is two standard errors (1/√n, Bartlett 1946) above 0
 */
export function correlationOf(
  v: ArrayLike<number>,
  flat: ArrayLike<number>,
  line: { readonly lowKms: number; readonly highKms: number },
): number {
  let [product, square, pairs] = [0, 0, 0];
  const isFree = (i: number) => (v[i]! < line.lowKms || v[i]! > line.highKms) && Number.isFinite(flat[i]!);
  for (let i = 1; i < v.length; i++) {
    if (!isFree(i - 1) || !isFree(i)) continue;
    product += flat[i]! * flat[i - 1]!;
    square += (flat[i]! ** 2 + flat[i - 1]! ** 2) / 2;
    pairs++;
  }
  const correlation = square > 0 ? product / square : 0;
  return correlation > 2 / Math.sqrt(Math.max(1, pairs)) ? Math.min(0.9, correlation) : 0;
}

/** Gaussian noise whose neighbouring channels are correlated: first-order autoregressive. */
export function correlatedNoise(count: number, sigma: number, correlation: number, random: Random): Float64Array {
  const fresh = Math.sqrt(1 - correlation ** 2);
  const noise = new Float64Array(count);
  let last = random.gaussian();
  for (let i = 0; i < count; i++) {
    if (i > 0) last = correlation * last + fresh * random.gaussian();
    noise[i] = sigma * last;
  }
  return noise;
}
