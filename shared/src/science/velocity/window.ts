import { SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/**
 * Velocity of one object in the rest frame of another at nearly the same place, (cz - cz₀)/(1 + z₀).
 *
 * @param czKms optical cz of the object, km/s
 * @param referenceCzKms optical cz of the reference (the HI detection), km/s, same frame
 * @returns km/s, positive for the more distant or receding object
 * @throws {DomainError} for velocities that are not finite or a reference at or below -c
 *
 * Source: Harrison (1974), ApJ 191, L51; Danese, De Zotti & di Tullio (1980), A&A 82, 322 (from memory).
 */
export function velocityDifference(czKms: number, referenceCzKms: number): number {
  if (!Number.isFinite(czKms) || !(referenceCzKms > -SPEED_OF_LIGHT_KMS && referenceCzKms < Infinity)) {
    throw new DomainError(`velocityDifference: expected finite cz, got ${czKms} and ${referenceCzKms} km/s`);
  }
  return (czKms - referenceCzKms) / (1 + referenceCzKms / SPEED_OF_LIGHT_KMS);
}

/** Whether an object lies within ± `windowKms` (inclusive) of the reference; km/s. See {@link velocityDifference}. */
export function withinVelocityWindow(czKms: number, referenceCzKms: number, windowKms: number): boolean {
  if (!(windowKms >= 0)) throw new DomainError(`withinVelocityWindow: expected a window >= 0, got ${windowKms}`);
  return Math.abs(velocityDifference(czKms, referenceCzKms)) <= windowKms;
}
