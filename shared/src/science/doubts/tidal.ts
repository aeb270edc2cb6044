import { GRAVITATION_KPC_KMS2 } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/** Kiloparsecs travelled in 1 Gyr at 1 km/s. */
export const KPC_PER_KMS_GYR = 1.022712165;

/**
 * Distance debris drifts in free flight.
 *
 * @param speedKms speed, km/s
 * @param timeGyr time, Gyr
 * @returns distance, kpc
 */
export function freeFlightKpc(speedKms: number, timeGyr: number): number {
  return KPC_PER_KMS_GYR * speedKms * timeGyr;
}

/**
 * Speed that escapes a point mass: debris slower than this is bound to the neighbour.
 *
 * @param massSolar total mass of the neighbour, solar masses, positive
 * @param radiusKpc distance from it, kpc, positive; a projected one gives an upper limit
 * @returns sqrt(2 G M / R), km/s
 * @throws {DomainError} if an input is not positive
 */
export function escapeSpeed(massSolar: number, radiusKpc: number): number {
  if (!(massSolar > 0 && radiusKpc > 0)) throw new DomainError(`escapeSpeed: got ${massSolar}, ${radiusKpc} kpc`);
  return Math.sqrt((2 * GRAVITATION_KPC_KMS2 * massSolar) / radiusKpc);
}

/**
 * Radius inside which a satellite holds its own gas against a neighbour.
 *
 * @param massSolar mass of the satellite, solar masses, positive
 * @param neighbourSolar mass of the neighbour, solar masses, positive
 * @param distanceKpc their distance, kpc, positive
 * @returns R (m / 3M)^(1/3), kpc
 * @throws {DomainError} if an input is not positive
 *
 * Source: estimate of the kind of King (1962), AJ 67, 471.
 */
export function tidalRadius(massSolar: number, neighbourSolar: number, distanceKpc: number): number {
  if (!(massSolar > 0 && neighbourSolar > 0 && distanceKpc > 0)) {
    throw new DomainError(`tidalRadius: got ${massSolar}, ${neighbourSolar}, ${distanceKpc} kpc`);
  }
  return distanceKpc * Math.cbrt(massSolar / (3 * neighbourSolar));
}
