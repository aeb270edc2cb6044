import { GRAVITATION_KPC_KMS2 } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/** Critical density, solar masses per cubic Mpc, 3 H0^2 / (8 pi G). */
export function criticalDensity(h0: number): number {
  return (3 * h0 ** 2) / (8 * Math.PI * GRAVITATION_KPC_KMS2 * 1e-3);
}

/**
 * Radius inside which a halo has 200 times the critical density.
 *
 * @param mass mass inside it, solar masses, positive
 * @param h0 Hubble constant, km/s/Mpc
 * @returns kpc
 * @throws {DomainError} if the mass is not positive
 * Source: definition, [3 M / (800 pi rho_c)]^(1/3).
 *
 * Method: measures.
 */
export function r200Kpc(mass: number, h0 = 70): number {
  if (!(mass > 0)) throw new DomainError(`r200Kpc: mass must be positive, got ${mass}`);
  return 1000 * Math.cbrt((3 * mass) / (800 * Math.PI * criticalDensity(h0)));
}

/** Circular velocity at R200, km/s. */
export function v200Kms(mass: number, h0 = 70): number {
  return Math.sqrt((GRAVITATION_KPC_KMS2 * mass) / r200Kpc(mass, h0));
}

/** Mass of a group of a velocity dispersion: sigma is taken as V200 / sqrt 2 (isothermal), so R200 = sqrt 2 sigma / (10 H0). */
export function r200OfDispersionKpc(dispersionKms: number, h0 = 70): number {
  if (!(dispersionKms > 0)) throw new DomainError(`r200OfDispersionKpc: got ${dispersionKms} km/s`);
  return (1000 * Math.SQRT2 * dispersionKms) / (10 * h0);
}

/** A structure: its reach and depth. */
export interface Structure {
  r200Kpc: number;
  dispersionKms: number;
}

/**
 * Whether a place belongs to a group or a cluster.
 *
 * @param structure group or cluster
 * @param separationKpc projected separation at the structure's own distance, kpc
 * @param differenceKms velocity difference from its mean, km/s
 * @param reach in units of R200; 1 strict, 2 to 3 loose
 *
 * Method: surroundings.
 */
export function isMember(structure: Structure, separationKpc: number, differenceKms: number, reach: number): boolean {
  return separationKpc <= reach * structure.r200Kpc && Math.abs(differenceKms) <= 3 * structure.dispersionKms;
}

/** Velocity dispersion from which a structure is called a cluster, km/s. Common practice, about 1e14 solar masses. */
export const CLUSTER_DISPERSION_KMS = 450;
