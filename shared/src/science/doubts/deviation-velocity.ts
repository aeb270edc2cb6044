import { DomainError } from '../domain-error.ts';

/** A flat-rotating Galactic disc. All are choices: stored with every result. */
export interface GalacticDisc {
  speedKms: number;
  sunKpc: number;
  radiusKpc: number;
  heightKpc: number;
  /** Inside this radius the disc turns as a solid body. */
  solidKpc: number;
}

/** Flat 220 km/s, R0 8.5 kpc, R < 20 kpc, |z| < 5 kpc, solid body inside 0.5 kpc (later practice than Wakker's, from memory). */
export const GALACTIC_DISC: GalacticDisc = { speedKms: 220, sunKpc: 8.5, radiusKpc: 20, heightKpc: 5, solidKpc: 0.5 };

/**
 * Velocities the Galactic disc can have along a line of sight.
 *
 * @param lonRad Galactic longitude, radians
 * @param latRad Galactic latitude, radians
 * @param disc model of the disc
 * @returns smallest and largest LSR velocity, km/s; zero, the Sun's own gas, is always between them
 * @throws {DomainError} if a direction is not finite
 *
 * Exact: the velocity is monotone in the galactocentric radius, so the extremes are at the smallest and largest radius.
 */
export function discVelocities(lonRad: number, latRad: number, disc = GALACTIC_DISC): { min: number; max: number } {
  if (![lonRad, latRad].every(Number.isFinite))
    throw new DomainError(`discVelocities: got l ${lonRad}, b ${latRad} rad`);
  const { speedKms, sunKpc, radiusKpc, heightKpc, solidKpc } = disc;
  const across = Math.sin(lonRad) * Math.cos(latRad);
  const toCentre = sunKpc * Math.cos(lonRad);
  // In-plane distance at which the sight line leaves the disc, by its rim or by its height.
  const rim = toCentre + Math.sqrt(radiusKpc ** 2 - (sunKpc * Math.sin(lonRad)) ** 2);
  const top = heightKpc / Math.abs(Math.tan(latRad));
  const end = Math.min(rim, top);
  const radiusAt = (d: number) => Math.sqrt(sunKpc ** 2 + d ** 2 - 2 * d * toCentre);
  const velocityAt = (radius: number) => (speedKms / Math.max(radius, solidKpc) - speedKms / sunKpc) * sunKpc * across;
  const nearest = Math.min(Math.max(toCentre, 0), end);
  const velocities = [0, velocityAt(radiusAt(end)), velocityAt(radiusAt(nearest))];
  return { min: Math.min(...velocities), max: Math.max(...velocities) };
}

/**
 * Deviation velocity: how far a velocity lies outside what the Galactic disc allows in that direction.
 *
 * @param lonRad Galactic longitude, radians
 * @param latRad Galactic latitude, radians
 * @param lsrKms velocity in the kinematic LSR, km/s
 * @param disc model of the disc
 * @returns v - v_max above the range (positive), v - v_min below it (negative), else 0, km/s
 * @throws {DomainError} if an input is not finite
 *
 * Source: Wakker (1991), A&A 250, 499.
 *
 * Method: doubts.
 */
export function deviationVelocity(lonRad: number, latRad: number, lsrKms: number, disc = GALACTIC_DISC): number {
  if (!Number.isFinite(lsrKms)) throw new DomainError(`deviationVelocity: velocity must be finite, got ${lsrKms}`);
  const { min, max } = discVelocities(lonRad, latRad, disc);
  if (lsrKms > max) return lsrKms - max;
  return lsrKms < min ? lsrKms - min : 0;
}
