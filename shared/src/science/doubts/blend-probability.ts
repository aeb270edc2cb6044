import { ARCSECOND } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { logGamma, upperIncompleteGamma } from '../robustness/gamma-function.ts';

/** Schechter form of the HI mass function; density per Mpc^3. */
export interface HiMassFunction {
  densityMpc3: number;
  logMassStar: number;
  slope: number;
}

/** Jones et al. (2018), MNRAS 477, 2, from memory, H0 = 70. */
export const HI_MASS_FUNCTION: HiMassFunction = { densityMpc3: 4.5e-3, logMassStar: 9.94, slope: -1.25 };

/** Power-law correlation function xi = (r / r0)^-gamma, r0 in Mpc. */
export interface Clustering {
  lengthMpc: number;
  slope: number;
}

/** HI-selected galaxies: 3.3/h Mpc, 1.51 (Martin et al. 2012, from memory), h = 0.7. */
export const HI_CLUSTERING: Clustering = { lengthMpc: 3.3 / 0.7, slope: 1.51 };

/**
 * Space density of galaxies above an HI mass.
 *
 * @param logMass log10 of the least HI mass in solar masses
 * @param massFunction Schechter parameters
 * @returns galaxies per Mpc^3: phi* Gamma(alpha + 1, M / M*)
 */
export function hiDensity(logMass: number, massFunction = HI_MASS_FUNCTION): number {
  return (
    massFunction.densityMpc3 * upperIncompleteGamma(massFunction.slope + 1, 10 ** (logMass - massFunction.logMassStar))
  );
}

/**
 * Mean number of other gas-rich galaxies in the same beam and at the same velocity.
 *
 * @param beamArcmin beam FWHM, arcmin, positive
 * @param distanceMpc distance, Mpc, positive
 * @param logMass log10 of the least HI mass that matters, solar masses
 * @param options half of the velocity window (km/s), H0, clustering (null for none) and mass function
 * @returns mean number inside half a beam; 1 - exp(-N) is the chance of a blend
 * @throws {DomainError} if beam or distance is not positive
 *
 * The uniform part fills a cylinder of the velocity window, the clustered part is integrated along the whole line of
 * sight. Source: method after Jones et al. (2015), MNRAS 449, 1856.
 */
export function blendNumber(
  beamArcmin: number,
  distanceMpc: number,
  logMass = 8,
  options: { windowKms?: number; h0?: number; clustering?: Clustering | null; massFunction?: HiMassFunction } = {},
): number {
  if (!(beamArcmin > 0 && distanceMpc > 0)) {
    throw new DomainError(
      `blendNumber: beam and distance must be positive, got ${beamArcmin} arcmin, ${distanceMpc} Mpc`,
    );
  }
  const { windowKms = 200, h0 = 70, clustering = HI_CLUSTERING } = options;
  const radius = distanceMpc * (beamArcmin / 2) * 60 * ARCSECOND;
  const cylinder = Math.PI * radius ** 2 * ((2 * windowKms) / h0);
  return hiDensity(logMass, options.massFunction) * (cylinder + (clustering ? excessVolume(radius, clustering) : 0));
}

/** Integral of xi over a cylinder of a radius and infinite length, Mpc^3. */
function excessVolume(radius: number, { lengthMpc, slope }: Clustering): number {
  const sight = Math.sqrt(Math.PI) * Math.exp(logGamma((slope - 1) / 2) - logGamma(slope / 2));
  return (2 * Math.PI * lengthMpc ** slope * sight * radius ** (3 - slope)) / (3 - slope);
}
