import { assertDirection, wrapTurn } from './direction.ts';

/**
 * Position angle of point 2 seen from point 1, from north through east.
 *
 * @param lon1 longitude of point 1, radians
 * @param lat1 latitude of point 1, radians
 * @param lon2 longitude of point 2, radians
 * @param lat2 latitude of point 2, radians
 * @returns position angle, radians, in [0, 2π); 0 where it is undefined (coincident or antipodal points)
 * @throws {DomainError} if any input is not finite or a latitude is out of range
 *
 * At a pole every direction is south or north: the angle then refers to the meridian of `lon1`. Differences of
 * position angles must be taken modulo a turn.
 * Source: spherical trigonometry (four-part formula), e.g. Green (1985), Spherical Astronomy (from memory).
 */
export function positionAngle(lon1: number, lat1: number, lon2: number, lat2: number): number {
  assertDirection('positionAngle', lon1, lat1);
  assertDirection('positionAngle', lon2, lat2);
  const dLon = lon2 - lon1;
  const half = Math.sin(dLon / 2);
  const east = Math.cos(lat2) * Math.sin(dLon);
  const north = Math.sin(lat2 - lat1) + 2 * Math.sin(lat1) * Math.cos(lat2) * half * half;
  return wrapTurn(Math.atan2(east, north));
}
