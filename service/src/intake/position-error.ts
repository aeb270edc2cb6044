import type { ResolvedSettings } from './resolved.ts';

/**
 * How many 1-D standard deviations each kind of position error is, for errors equal on both axes.
 * Source: the Rayleigh distribution: mean sqrt(pi/2); r_p = sigma sqrt(-2 ln(1 - p)) with p = 68.27, 90, 95 %.
 */
const SIGMAS: Readonly<Record<ResolvedSettings['errorMeaning'], number>> = {
  sigma1d: 1,
  meanRadial: Math.sqrt(Math.PI / 2),
  radial68: Math.sqrt(-2 * Math.log(1 - 0.682689492137086)),
  radial90: Math.sqrt(-2 * Math.log(0.1)),
  radial95: Math.sqrt(-2 * Math.log(0.05)),
};

/** A position error of a stated meaning as the 1-D standard deviation, in the same unit. NaN stays. */
export function toSigma1d(error: number, meaning: ResolvedSettings['errorMeaning']): number {
  return error / SIGMAS[meaning];
}
