import { DomainError } from '../domain-error.ts';

/** Least peculiar velocity that may be assumed, km/s: the local one-dimensional dispersion (from memory). */
export const LEAST_PECULIAR_VELOCITY_KMS = 160;

/**
 * Standard error of a redshift distance from peculiar motion and the velocity error.
 *
 * @param peculiarKms one-dimensional peculiar velocity, km/s; values below 160 are raised to it
 * @param czErrorKms standard error of the velocity, km/s, >= 0
 * @param h0 km/s/Mpc
 * @returns Mpc, √(σ_pec² + σ_cz²)/H₀; the same at any distance
 * @throws {DomainError} for negative values or h0 that is not positive
 *
 * The error of H₀ is common to all sources and is kept apart: see {@link hubbleConstantError}. Where the error is a
 * large part of the distance, draw peculiar velocities, not distances.
 * Source: quadrature.
 */
export function redshiftDistanceError(peculiarKms: number, czErrorKms: number, h0: number): number {
  if (!(peculiarKms >= 0 && czErrorKms >= 0 && h0 > 0) || !Number.isFinite(peculiarKms + czErrorKms)) {
    throw new DomainError(`redshiftDistanceError: got ${peculiarKms} km/s, ${czErrorKms} km/s and h0 ${h0}`);
  }
  return Math.hypot(Math.max(peculiarKms, LEAST_PECULIAR_VELOCITY_KMS), czErrorKms) / h0;
}

/** Error of a redshift distance from that of H₀, D σ_H₀/H₀, Mpc: common to all sources. */
export function hubbleConstantError(distanceMpc: number, h0: number, h0Error: number): number {
  if (!(distanceMpc >= 0 && h0 > 0 && h0Error >= 0)) {
    throw new DomainError(`hubbleConstantError: got ${distanceMpc} Mpc, h0 ${h0} ± ${h0Error}`);
  }
  return (distanceMpc * h0Error) / h0;
}

/** What the error of a distance does to what is derived from it, first order. */
export interface DistanceErrorEffect {
  /** σ_D/D. */
  readonly fraction: number;
  /** Fractional error of a mass or luminosity, 2 σ_D/D. */
  readonly massFraction: number;
  /** The same in dex, 2 σ_D/(D ln 10). */
  readonly massDex: number;
  /** Error of the distance modulus, mag. */
  readonly modulusMag: number;
}

/**
 * Effect of a distance error on masses and magnitudes.
 *
 * @param distanceMpc Mpc, > 0
 * @param errorMpc standard error, Mpc, >= 0
 * @throws {DomainError} for values out of range
 *
 * Gas-to-light and gas-to-stars ratios do not depend on the distance at all.
 * Source: first-order propagation.
 */
export function distanceErrorEffect(distanceMpc: number, errorMpc: number): DistanceErrorEffect {
  if (!(distanceMpc > 0 && errorMpc >= 0) || !Number.isFinite(distanceMpc + errorMpc)) {
    throw new DomainError(`distanceErrorEffect: got ${distanceMpc} ± ${errorMpc} Mpc`);
  }
  const fraction = errorMpc / distanceMpc;
  return {
    fraction,
    massFraction: 2 * fraction,
    massDex: (2 * fraction) / Math.LN10,
    modulusMag: (5 * fraction) / Math.LN10,
  };
}

/**
 * Fractional error of a mass ∝ S D², √((σ_S/S)² + 4 (σ_D/D)²).
 *
 * @param fluxFraction σ_S/S, >= 0
 * @param distanceFraction σ_D/D, >= 0
 * @throws {DomainError} for negative values
 *
 * Source: first-order propagation.
 */
export function massFractionalError(fluxFraction: number, distanceFraction: number): number {
  if (!(fluxFraction >= 0 && distanceFraction >= 0)) {
    throw new DomainError(`massFractionalError: got ${fluxFraction} and ${distanceFraction}`);
  }
  return Math.hypot(fluxFraction, 2 * distanceFraction);
}
