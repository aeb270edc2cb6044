import { DomainError } from '../domain-error.ts';
import { solve } from './least-squares.ts';

export interface Baseline {
  /** Flux less the fitted baseline, channel for channel. */
  readonly flux: Float64Array;
  /** Standard deviation of the channels outside the line, in the unit of the flux. */
  readonly noise: number;
  /** Channels the noise and the baseline rest on. */
  readonly channels: number;
}

const ROUNDS = 4;
const CLIP_SIGMAS = 3.5;
/** Standard deviation over median absolute deviation of a Gaussian. */
const SIGMA_PER_MAD = 1.482602;

/**
 * Fits a polynomial to what lies outside the line and takes it off.
 *
 * @param v velocities, km/s
 * @param flux values in any unit; NaN is a channel without a value
 * @param line the line's window, km/s, left out of the fit
 * @param order of the polynomial, 0 to 5
 * @throws {DomainError} when fewer than order + 5 channels lie outside the line, or they are all the same
 *
 * Channels beyond 3.5 sigma (of the median absolute deviation) are left out in turn, so that neighbours and
 * interference do not lift it.
 */
export function takeOffBaseline(
  v: ArrayLike<number>,
  flux: ArrayLike<number>,
  line: { readonly lowKms: number; readonly highKms: number },
  order = 1,
): Baseline {
  const middle = (line.lowKms + line.highKms) / 2;
  const span = Math.max(1e-9, Math.abs(v[v.length - 1]! - v[0]!) / 2);
  const free: number[] = [];
  for (let i = 0; i < v.length; i++) {
    if ((v[i]! < line.lowKms || v[i]! > line.highKms) && Number.isFinite(flux[i]!)) free.push(i);
  }
  let used = free;
  let coefficients = new Array<number>(order + 1).fill(0);
  let noise = NaN;
  for (let round = 0; round < ROUNDS; round++) {
    if (used.length < order + 5) {
      throw new DomainError(`takeOffBaseline: only ${used.length} channels outside the line for order ${order}`);
    }
    coefficients = fitPolynomial(used, v, flux, middle, span, order);
    const residual = (i: number) => flux[i]! - evaluate(coefficients, (v[i]! - middle) / span);
    const sum = used.reduce((total, i) => total + residual(i) ** 2, 0);
    noise = Math.sqrt(sum / Math.max(1, used.length - order - 1));
    const limit = CLIP_SIGMAS * SIGMA_PER_MAD * median(used.map((i) => Math.abs(residual(i))));
    const kept = free.filter((i) => Math.abs(residual(i)) <= limit);
    if (kept.length === used.length) break;
    used = kept;
  }
  if (!(noise > 0)) throw new DomainError('takeOffBaseline: the channels outside the line have no noise');
  const flat = Float64Array.from(
    { length: v.length },
    (_, i) => flux[i]! - evaluate(coefficients, (v[i]! - middle) / span),
  );
  return { flux: flat, noise, channels: used.length };
}

const evaluate = (coefficients: readonly number[], x: number) => coefficients.reduceRight((sum, c) => sum * x + c, 0);

function fitPolynomial(
  used: readonly number[],
  v: ArrayLike<number>,
  flux: ArrayLike<number>,
  middle: number,
  span: number,
  order: number,
): number[] {
  const size = order + 1;
  const normal = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  const right = new Array<number>(size).fill(0);
  for (const i of used) {
    const x = (v[i]! - middle) / span;
    for (let j = 0; j < size; j++) {
      right[j]! += flux[i]! * x ** j;
      for (let k = 0; k < size; k++) normal[j]![k]! += x ** (j + k);
    }
  }
  return solve(normal, right) ?? new Array<number>(size).fill(0);
}

function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const half = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[half]! : (sorted[half - 1]! + sorted[half]!) / 2;
}
