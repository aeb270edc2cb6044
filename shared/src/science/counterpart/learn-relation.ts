import { DomainError } from '../domain-error.ts';

export interface FittedLine {
  /** Value at the pivot. */
  intercept: number;
  slope: number;
  /** Robust scatter about the line: 1.4826 times the median absolute residual. */
  scatter: number;
  used: number;
}

/** Secure counterparts a refit needs. */
export const MINIMUM_SECURE = 200;

/**
 * Straight line through secure counterparts, outliers clipped; never a quadratic, which runs away at low mass.
 *
 * @param x log10 of the HI mass
 * @param y what goes with it (log10 of the stellar mass); NaN pairs are left out
 * @param pivot x at which the intercept is given
 * @returns undefined with fewer than {@link MINIMUM_SECURE} pairs, or no spread in x
 * @throws {DomainError} if the arrays differ in length
 */
export function fitLine(x: ArrayLike<number>, y: ArrayLike<number>, pivot: number): FittedLine | undefined {
  if (x.length !== y.length) throw new DomainError(`fitLine: ${x.length} abscissae, ${y.length} ordinates`);
  let keep: number[] = [];
  for (let i = 0; i < x.length; i++) if (Number.isFinite(x[i]!) && Number.isFinite(y[i]!)) keep.push(i);
  let line: FittedLine | undefined;
  for (let pass = 0; pass < 5; pass++) {
    if (keep.length < MINIMUM_SECURE) return undefined;
    line = leastSquares(x, y, keep, pivot);
    if (!line) return undefined;
    const { intercept, slope, scatter } = line;
    const within = keep.filter((i) => Math.abs(y[i]! - intercept - slope * (x[i]! - pivot)) <= 4 * scatter);
    if (within.length === keep.length || scatter === 0) break;
    keep = within;
  }
  return line;
}

function leastSquares(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  keep: number[],
  pivot: number,
): FittedLine | undefined {
  let sx = 0;
  let sy = 0;
  for (const i of keep) {
    sx += x[i]! - pivot;
    sy += y[i]!;
  }
  const mx = sx / keep.length;
  const my = sy / keep.length;
  let sxx = 0;
  let sxy = 0;
  for (const i of keep) {
    sxx += (x[i]! - pivot - mx) ** 2;
    sxy += (x[i]! - pivot - mx) * (y[i]! - my);
  }
  if (!(sxx > 0)) return undefined;
  const slope = sxy / sxx;
  const intercept = my - slope * mx;
  const residuals = Float64Array.from(keep, (i) => Math.abs(y[i]! - intercept - slope * (x[i]! - pivot))).sort();
  return { intercept, slope, scatter: 1.4826 * residuals[residuals.length >> 1]!, used: keep.length };
}
