import { SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/**
 * Distance by the linear Hubble law, v/H₀.
 *
 * @param velocityKms recession velocity (in the Local Group or CMB frame), km/s, >= 0
 * @param h0 km/s/Mpc
 * @returns Mpc
 * @throws {DomainError} for a negative velocity or h0 that is not positive
 *
 * To be trusted above some 1500 km/s and away from clusters only.
 * Source: Hubble (1929), PNAS 15, 168.
 */
export function hubbleDistance(velocityKms: number, h0: number): number {
  if (!(velocityKms >= 0 && velocityKms < Infinity && h0 > 0)) {
    throw new DomainError(`hubbleDistance: expected a velocity >= 0 and h0 > 0, got ${velocityKms} and ${h0}`);
  }
  return velocityKms / h0;
}

/** What a stated distance demands of a stated redshift. */
export interface HubbleConsistency {
  readonly czKms: number;
  /** Distance by the linear law, Mpc. */
  readonly hubbleMpc: number;
  /** H₀ that would make both agree, km/s/Mpc. */
  readonly impliedH0: number;
  /** Peculiar velocity that would make both agree, km/s. */
  readonly impliedPeculiarKms: number;
}

/**
 * Confronts a distance with a redshift: how far from the Hubble flow they are together.
 *
 * @param z redshift
 * @param distanceMpc stated distance, Mpc, > 0
 * @param h0 km/s/Mpc
 * @throws {DomainError} for a distance or h0 that is not positive
 *
 * Source: arithmetic.
 */
export function hubbleConsistency(z: number, distanceMpc: number, h0: number): HubbleConsistency {
  if (!(distanceMpc > 0 && h0 > 0 && Number.isFinite(z))) {
    throw new DomainError(`hubbleConsistency: got z ${z}, ${distanceMpc} Mpc and h0 ${h0}`);
  }
  const czKms = z * SPEED_OF_LIGHT_KMS;
  return {
    czKms,
    hubbleMpc: czKms / h0,
    impliedH0: czKms / distanceMpc,
    impliedPeculiarKms: czKms - h0 * distanceMpc,
  };
}
