import { ARCSECOND } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/** One log-normal component of a size distribution. */
export interface SizeComponent {
  weight: number;
  median: number;
  scatterDex: number;
}

/** Half-light radii as a mixture of log-normals; the unit (kpc or arcsec) is that of `median`. Weights add to one. */
export type SizePrior = readonly SizeComponent[];

/** Share of gas-rich galaxies much more diffuse than the mean relation, and by how much. Our choice; configurable. */
export const DIFFUSE_TAIL = { weight: 0.15, factor: 2.5, scatterDex: 0.2 } as const;

/**
 * Half-light radii of late-type galaxies of a stellar mass, with a diffuse tail.
 *
 * @param logStellarMass log10 of the stellar mass in solar masses
 * @param tail weight, size factor and scatter of the diffuse component
 * @returns mixture of two log-normals, kpc
 * @throws {DomainError} if the mass is not finite
 *
 * Below 1e8 solar masses the relation is extrapolated: 1.3 kpc at 1e8, 0.7 kpc at 1e6.
 * Source: Shen et al. (2003), MNRAS 343, 978, late types (coefficients from memory); the tail after HI-bearing
 * ultra-diffuse galaxies (our choice).
 *
 * Method: expected.
 */
export function sizePriorKpc(
  logStellarMass: number,
  tail: { weight: number; factor: number; scatterDex: number } = DIFFUSE_TAIL,
): SizePrior {
  if (!Number.isFinite(logStellarMass)) throw new DomainError(`sizePriorKpc: got log mass ${logStellarMass}`);
  const massRatio = 10 ** (logStellarMass - Math.log10(3.98e10));
  const median = 0.1 * 10 ** (0.14 * logStellarMass) * (1 + massRatio) ** (0.39 - 0.14);
  const scatterDex = (0.34 + (0.47 - 0.34) / (1 + massRatio ** 2)) / Math.LN10;
  return [
    { weight: 1 - tail.weight, median, scatterDex },
    { weight: tail.weight, median: median * tail.factor, scatterDex: tail.scatterDex },
  ];
}

/**
 * The same sizes on the sky.
 *
 * @param prior sizes, kpc
 * @param angularMpc angular-diameter distance, Mpc, positive
 * @param distanceScatterDex scatter of the distance, dex, added in quadrature
 * @returns sizes, arcsec
 * @throws {DomainError} if the distance is not positive
 */
export function sizePriorArcsec(prior: SizePrior, angularMpc: number, distanceScatterDex = 0): SizePrior {
  if (!(angularMpc > 0)) throw new DomainError(`sizePriorArcsec: distance must be positive, got ${angularMpc} Mpc`);
  const arcsecPerKpc = 1 / (angularMpc * 1000 * ARCSECOND);
  return prior.map(({ weight, median, scatterDex }) => ({
    weight,
    median: median * arcsecPerKpc,
    scatterDex: Math.hypot(scatterDex, distanceScatterDex),
  }));
}
