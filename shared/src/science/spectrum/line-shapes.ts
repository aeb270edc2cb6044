import { erf } from '../robustness/error-function.ts';

/** A Gaussian line. */
export interface GaussianLine {
  readonly peak: number;
  readonly centreKms: number;
  readonly sigmaKms: number;
}

/** Gaussian of velocity, in the unit of its peak. */
export const gaussianLine = (v: number, { peak, centreKms, sigmaKms }: GaussianLine): number =>
  peak * Math.exp(-0.5 * ((v - centreKms) / sigmaKms) ** 2);

/** Parameters of the busy function with the two flanks equally steep and the trough a parabola (n = 2). */
export interface BusyLine {
  /** Level between the flanks where the trough is lowest. */
  readonly level: number;
  /** Steepness of the flanks, per km/s. */
  readonly steepness: number;
  readonly centreKms: number;
  /** Half of the width between the flanks. */
  readonly halfWidthKms: number;
  /** Where the trough is lowest. */
  readonly troughKms: number;
  /** Rise of the trough, per (km/s)²; 0 is a flat or round top. */
  readonly curvature: number;
}

/**
 * The busy function, a description of double-horned HI lines: two error functions for the flanks, a parabola between.
 *
 * @param v velocity, km/s
 * @returns flux density in the unit of `level`
 *
 * Source: Westmeier et al. (2014), MNRAS 438, 1176, equation 4, with b1 = b2 and n = 2.
 */
export function busyLine(v: number, line: BusyLine): number {
  const x = v - line.centreKms;
  const rise = erf(line.steepness * (line.halfWidthKms + x)) + 1;
  const fall = erf(line.steepness * (line.halfWidthKms - x)) + 1;
  return (line.level / 4) * rise * fall * (line.curvature * (v - line.troughKms) ** 2 + 1);
}
