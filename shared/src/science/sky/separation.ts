import { assertDirection } from './direction.ts';

/**
 * Great-circle separation of two directions, without loss of precision from 0 to π.
 *
 * @param lon1 longitude of point 1, radians, any finite value (not wrapped)
 * @param lat1 latitude of point 1, radians, in [-π/2, π/2]
 * @param lon2 longitude of point 2, radians
 * @param lat2 latitude of point 2, radians, in [-π/2, π/2]
 * @returns separation, radians, in [0, π]
 * @throws {DomainError} if any input is not finite or a latitude is out of range
 *
 * Both points must be in the same frame and epoch: nothing is precessed here. The arccosine form is not used, as it
 * returns 0 for one milliarcsecond.
 * Source: T. Vincenty (1975), Survey Review 23, 88, special case of the sphere.
 */
export function separation(lon1: number, lat1: number, lon2: number, lat2: number): number {
  assertDirection('separation', lon1, lat1);
  assertDirection('separation', lon2, lat2);
  const dLon = lon2 - lon1;
  const sin1 = Math.sin(lat1);
  const cos1 = Math.cos(lat1);
  const sin2 = Math.sin(lat2);
  const cos2 = Math.cos(lat2);
  const cosLon = Math.cos(dLon);
  const east = cos2 * Math.sin(dLon);
  // cos1 sin2 - sin1 cos2 cosLon, rearranged: the two products cancel to the last digits for close points.
  const half = Math.sin(dLon / 2);
  const north = Math.sin(lat2 - lat1) + 2 * sin1 * cos2 * half * half;
  return Math.atan2(Math.sqrt(east * east + north * north), sin1 * sin2 + cos1 * cos2 * cosLon);
}
