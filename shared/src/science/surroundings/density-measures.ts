import { DomainError } from '../domain-error.ts';

/** Constant of the tidal index, for masses in M_sun and distances in Mpc. Karachentsev et al. (2013), from memory; older papers 11.75. */
export const TIDAL_INDEX_CONSTANT = 10.96;

export interface Disturber {
  /** Mass in solar masses (L_K with M/L_K = 1). */
  mass: number;
  /** Distance from the target, Mpc; a projected one makes the index an upper bound. */
  separationMpc: number;
}

const pull = ({ mass, separationMpc }: Disturber): number => {
  if (!(mass > 0 && separationMpc > 0)) {
    throw new DomainError(`tidalIndex: mass ${mass}, separation ${separationMpc} Mpc must be positive`);
  }
  return mass / separationMpc ** 3;
};

/**
 * Tidal index of the main disturber, Theta_1 = max log10(M / D^3) - 10.96; below zero isolated.
 *
 * @throws {DomainError} without a disturber, or for one whose mass or separation is not positive
 * Source: Karachentsev & Makarov (1999); Karachentsev et al. (2013), AJ 145, 101 (constant from memory).
 *
 * Method: measures.
 */
export function tidalIndex(disturbers: readonly Disturber[]): number {
  if (disturbers.length === 0) throw new DomainError('tidalIndex: no disturber');
  return Math.log10(Math.max(...disturbers.map(pull))) - TIDAL_INDEX_CONSTANT;
}

/** The same of the five strongest disturbers together, Theta_5. @throws {DomainError} as {@link tidalIndex} */
export function tidalIndexOfFive(disturbers: readonly Disturber[]): number {
  if (disturbers.length === 0) throw new DomainError('tidalIndex: no disturber');
  const strongest = disturbers.map(pull).sort((a, b) => b - a);
  return Math.log10(strongest.slice(0, 5).reduce((sum, each) => sum + each, 0)) - TIDAL_INDEX_CONSTANT;
}

/**
 * Tidal strength Q = log10 sum (M_i / M_p) (D_p / d_i)^3; isolated below -2.
 *
 * @param neighbours mass over the primary's, and distance in units of the primary's diameter
 * @throws {DomainError} without a neighbour, or for values that are not positive
 * Source: Dahari (1984); Verley et al. (2007), A&A 472, 121.
 *
 * Method: measures.
 */
export function tidalStrength(neighbours: readonly { massRatio: number; diameters: number }[]): number {
  if (neighbours.length === 0) throw new DomainError('tidalStrength: no neighbour');
  let sum = 0;
  for (const { massRatio, diameters } of neighbours) {
    if (!(massRatio > 0 && diameters > 0)) throw new DomainError(`tidalStrength: got ${massRatio}, ${diameters}`);
    sum += massRatio / diameters ** 3;
  }
  return Math.log10(sum);
}

/**
 * Local number density eta_k = log10[(k - 1) / V(r_k)]; isolated below 2.4 (unit Mpc, from memory).
 *
 * @param rank k, at least 2
 * @param distanceMpc distance of the k-th neighbour, Mpc, positive
 * @throws {DomainError} if an input is out of range
 * Source: Verley et al. (2007).
 *
 * Method: measures.
 */
export function localDensity(rank: number, distanceMpc: number): number {
  if (!(rank >= 2 && distanceMpc > 0)) throw new DomainError(`localDensity: k ${rank}, r ${distanceMpc} Mpc`);
  return Math.log10((rank - 1) / ((4 / 3) * Math.PI * distanceMpc ** 3));
}

/**
 * Projected density Sigma_n = n / (pi d_n^2), per square Mpc.
 *
 * @param rank n, at least 1
 * @param distanceMpc projected distance of the n-th neighbour, Mpc, positive
 * @throws {DomainError} if an input is out of range
 * Source: Baldry et al. (2006) and others; common practice with n = 5, |dv| < 1000 km/s.
 *
 * Method: measures.
 */
export function projectedDensity(rank: number, distanceMpc: number): number {
  if (!(rank >= 1 && distanceMpc > 0)) throw new DomainError(`projectedDensity: n ${rank}, d ${distanceMpc} Mpc`);
  return rank / (Math.PI * distanceMpc ** 2);
}

/**
 * Whether a neighbour of some angular diameter spoils a galaxy's isolation; needs no redshift.
 *
 * @param diameter angular diameter of the galaxy
 * @param neighbourDiameter angular diameter of the neighbour, same unit
 * @param separation separation, same unit
 * Source: Karachentseva (1973): a_1/4 <= a_i <= 4 a_1 nearer than 20 a_i.
 *
 * Method: measures.
 */
export function spoilsIsolation(diameter: number, neighbourDiameter: number, separation: number): boolean {
  const similar = neighbourDiameter >= diameter / 4 && neighbourDiameter <= 4 * diameter;
  return similar && separation < 20 * neighbourDiameter;
}
