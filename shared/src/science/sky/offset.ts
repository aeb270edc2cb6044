import { assertDirection, type Direction, wrapTurn } from './direction.ts';
import { DomainError } from '../domain-error.ts';

/**
 * The point reached from a start along a great circle.
 *
 * @param lon longitude of the start, radians
 * @param lat latitude of the start, radians
 * @param angle position angle at the start, radians, north through east
 * @param distance great-circle distance, radians, >= 0
 * @returns direction of the end, radians, longitude in [0, 2π)
 * @throws {DomainError} if any input is not finite, the latitude out of range or the distance negative
 *
 * Source: spherical trigonometry; the inverse of separation and position angle together.
 */
export function offsetBy(lon: number, lat: number, angle: number, distance: number): Direction {
  assertDirection('offsetBy', lon, lat);
  if (!Number.isFinite(angle) || !(distance >= 0 && distance < Infinity)) {
    throw new DomainError(`offsetBy: expected a finite angle and a distance >= 0, got (${angle}, ${distance})`);
  }
  const sinD = Math.sin(distance);
  const cosD = Math.cos(distance);
  const north = sinD * Math.cos(angle);
  const east = sinD * Math.sin(angle);
  const sinLat = Math.sin(lat);
  const cosLat = Math.cos(lat);
  const inward = cosD * cosLat - north * sinLat;
  return {
    lon: wrapTurn(lon + Math.atan2(east, inward)),
    lat: Math.atan2(cosD * sinLat + north * cosLat, Math.sqrt(east * east + inward * inward)),
  };
}
