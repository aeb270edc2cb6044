import { DomainError } from '../domain-error.ts';
import type { Direction } from '../sky/direction.ts';
import { offsetBy } from '../sky/offset.ts';
import { separation } from '../sky/separation.ts';
import type { Random } from './random.ts';

export interface ControlRing {
  /** Inner and outer radius of the ring, in search radii. */
  innerRadii: number;
  outerRadii: number;
  /** Positions a source. */
  count: number;
  /** Tries before a place is given up. */
  tries: number;
}

/** At least 20 offsets, 5-60 search radii away: near enough to keep the density, too far for the counterpart. Common practice. */
export const CONTROL_RING: ControlRing = { innerRadii: 5, outerRadii: 60, count: 20, tries: 10 };

/** Control positions of one source and how many were asked for; those dropped are not counted as "no match". */
export interface ControlPositions {
  positions: Direction[];
  asked: number;
}

/**
 * Positions at which the whole match is repeated to see what chance does.
 *
 * @param source position of the source, radians
 * @param searchRadius search radius, radians, positive
 * @param random generator of this source
 * @param usable whether a place may serve: same footprint, mask and depth, and clear of HI sources (`clearOfSources`)
 * @param ring ring and numbers
 * @returns positions uniform over the ring's area that are usable; fewer than asked where there are not enough
 * @throws {DomainError} if the radius is not positive, the ring is empty or reaches beyond 90 degrees
 *
 * Repeats of a small ring overlap: no more than its area over that of the search circle are independent.
 */
export function controlPositions(
  source: Direction,
  searchRadius: number,
  random: Random,
  usable: (place: Direction) => boolean,
  ring = CONTROL_RING,
): ControlPositions {
  const inner = ring.innerRadii * searchRadius;
  const outer = ring.outerRadii * searchRadius;
  if (!(searchRadius > 0 && ring.innerRadii >= 1 && outer > inner && outer <= Math.PI / 2)) {
    throw new DomainError(`controlPositions: radius ${searchRadius} rad, ring ${ring.innerRadii}-${ring.outerRadii}`);
  }
  const positions: Direction[] = [];
  // Uniform over the area of the cap between the two radii.
  const near = Math.sin(inner / 2) ** 2;
  const far = Math.sin(outer / 2) ** 2;
  for (let k = 0; k < ring.count; k++) {
    for (let attempt = 0; attempt < ring.tries; attempt++) {
      const distance = 2 * Math.asin(Math.sqrt(near + (far - near) * random.uniform()));
      const place = offsetBy(source.lon, source.lat, 2 * Math.PI * random.uniform(), distance);
      if (usable(place)) {
        positions.push(place);
        break;
      }
    }
  }
  return { positions, asked: ring.count };
}

/**
 * Test that a place is clear of every HI source, for `controlPositions`.
 *
 * @param sources positions of HI sources near the ring, radians
 * @param distance least separation, radians; three beams is common
 */
export function clearOfSources(sources: readonly Direction[], distance: number): (place: Direction) => boolean {
  return (place) => sources.every(({ lon, lat }) => separation(place.lon, place.lat, lon, lat) >= distance);
}

/** Number of independent search circles a ring holds: its area over that of the circle, flat sky. */
export function independentOffsets(ring = CONTROL_RING): number {
  return ring.outerRadii ** 2 - ring.innerRadii ** 2;
}
