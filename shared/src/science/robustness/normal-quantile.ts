import { DomainError } from '../domain-error.ts';
import { erfc } from './error-function.ts';

/**
 * Standard normal deviate below which a probability lies.
 *
 * @param probability in (0, 1)
 * @returns z with P(Z < z) = probability, relative error about 1e-15
 * @throws {DomainError} outside (0, 1)
 *
 * Source: Abramowitz & Stegun 26.2.23 as a start, three steps of Halley's method on the error function.
 */
export function normalQuantile(probability: number): number {
  if (!(probability > 0 && probability < 1)) {
    throw new DomainError(`normalQuantile: probability must lie in (0, 1), got ${probability}`);
  }
  if (probability === 0.5) return 0;
  const tail = Math.min(probability, 1 - probability);
  const t = Math.sqrt(-2 * Math.log(tail));
  let z = t - (2.515517 + 0.802853 * t + 0.010328 * t * t) / (1 + 1.432788 * t + 0.189269 * t * t + 0.001308 * t ** 3);
  for (let k = 0; k < 3; k++) {
    const density = Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI);
    const step = (0.5 * erfc(z / Math.SQRT2) - tail) / density;
    z += step / (1 + 0.5 * z * step);
  }
  return probability < 0.5 ? -z : z;
}
