import { DomainError } from '../domain-error.ts';
import { logGamma } from '../robustness/gamma-function.ts';
import { BLANTON_2003, densityBrighterThan, type LuminosityFunction } from './schechter.ts';

/** The cylinder in which neighbours are looked for. */
export interface Window {
  radiusMpc: number;
  velocityWindowKms: number;
  h0: number;
}

/** Length of the cylinder, 2 dv / H0, Mpc. */
export function windowLength({ velocityWindowKms, h0 }: Window): number {
  return (2 * velocityWindowKms) / h0;
}

/** Volume of the cylinder, cubic Mpc. */
export function windowVolume(window: Window): number {
  return Math.PI * window.radiusMpc ** 2 * windowLength(window);
}

/** A power-law correlation function xi = (r / r0)^-gamma. */
export interface Clustering {
  r0Mpc: number;
  gamma: number;
}

/** HI-selected objects: r0 = 3.3 / h. Martin et al. (2012), ApJ 750, 38 (from memory). */
export const hiClustering = (h0: number): Clustering => ({ r0Mpc: 330 / h0, gamma: 1.51 });
/** Galaxies of L*: r0 = 5 / h. Davis & Peebles (1983). */
export const luminousClustering = (h0: number): Clustering => ({ r0Mpc: 500 / h0, gamma: 1.8 });

/**
 * Excess volume of the correlation function in the cylinder about an object, cubic Mpc.
 *
 * @throws {DomainError} unless 1 < gamma < 3
 *
 * The line of sight is taken as infinite, being far longer than r0. Source: projection of a power law, Davis & Peebles
 * (1983): 2 pi r0^g R^(3-g) / (3-g) Gamma(1/2) Gamma((g-1)/2) / Gamma(g/2).
 */
export function excessVolume({ radiusMpc }: Window, { r0Mpc, gamma }: Clustering): number {
  if (!(gamma > 1 && gamma < 3)) throw new DomainError(`excessVolume: gamma must lie in (1, 3), got ${gamma}`);
  const projection = Math.exp(logGamma(0.5) + logGamma((gamma - 1) / 2) - logGamma(gamma / 2));
  return (2 * Math.PI * r0Mpc ** gamma * projection * radiusMpc ** (3 - gamma)) / (3 - gamma);
}

/** How many times more objects there are about a clustered object than in the mean field: 1 + int xi / V. */
export function clusteringBoost(window: Window, clustering: Clustering): number {
  return 1 + excessVolume(window, clustering) / windowVolume(window);
}

/**
 * Expected number of neighbours that count and that a redshift survey did not see.
 *
 * @param limitAbsoluteMag what the survey reaches at that distance, M_r
 * @param faintestAbsoluteMag faintest neighbour that counts, M_r
 * @param window cylinder
 * @param law luminosity function
 * @returns for the mean field; times {@link clusteringBoost} for the clustered bracket. 0 where the survey goes deeper.
 *
 * Method: surroundings.
 */
export function missedNeighbours(
  limitAbsoluteMag: number,
  faintestAbsoluteMag: number,
  window: Window,
  law: LuminosityFunction = BLANTON_2003,
): number {
  if (limitAbsoluteMag >= faintestAbsoluteMag) return 0;
  const seen = densityBrighterThan(limitAbsoluteMag, window.h0, law);
  const all = densityBrighterThan(faintestAbsoluteMag, window.h0, law);
  return (all - seen) * windowVolume(window);
}

/** Count corrected for the part of the circle that is covered. @throws {DomainError} if nothing is */
export function coverageCorrected(count: number, coveredFraction: number): number {
  if (!(coveredFraction > 0 && coveredFraction <= 1)) {
    throw new DomainError(`coverageCorrected: covered fraction ${coveredFraction}`);
  }
  return count / coveredFraction;
}
