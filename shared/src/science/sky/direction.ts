import { DomainError } from '../domain-error.ts';

const QUARTER = Math.PI / 2;
const TURN = 2 * Math.PI;
/** Latitudes a few ulp beyond a pole come out of degree conversion and are accepted. */
const POLE_SLACK = 4e-16;

/**
 * Refuses a direction that is not finite or whose latitude is beyond a pole.
 *
 * @param where name of the calling function, put first in the message
 * @param lon longitude, radians, any finite value
 * @param lat latitude, radians, in [-π/2, π/2]
 * @throws {DomainError} with the offending pair
 */
export function assertDirection(where: string, lon: number, lat: number): void {
  if (!(Number.isFinite(lon) && Math.abs(lat) <= QUARTER + POLE_SLACK)) {
    throw new DomainError(`${where}: expected a direction in radians with |latitude| <= π/2, got (${lon}, ${lat})`);
  }
}

/** Longitude or position angle brought into [0, 2π), radians. */
export function wrapTurn(angle: number): number {
  const wrapped = angle - TURN * Math.floor(angle / TURN);
  return wrapped >= TURN || wrapped < 0 ? 0 : wrapped;
}

/** A direction on the sky: longitude and latitude in radians. */
export interface Direction {
  readonly lon: number;
  readonly lat: number;
}

/** Unit vector of a direction; x points to (0, 0), y to (π/2, 0), z to the north pole. */
export type UnitVector = readonly [x: number, y: number, z: number];

/** Unit vector of a direction given in radians. */
export function toVector(lon: number, lat: number): UnitVector {
  const c = Math.cos(lat);
  return [c * Math.cos(lon), c * Math.sin(lon), Math.sin(lat)];
}

/** Direction of a vector of any non-zero length; longitude in [0, 2π), 0 at the poles. */
export function fromVector([x, y, z]: UnitVector): Direction {
  const across = Math.hypot(x, y);
  return { lon: across === 0 ? 0 : wrapTurn(Math.atan2(y, x)), lat: Math.atan2(z, across) };
}
