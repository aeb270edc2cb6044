import { assertDirection, toVector, wrapTurn } from './direction.ts';
import { DomainError } from '../domain-error.ts';

/** Turn between successive points of the spiral, radians: the golden angle. */
const GOLDEN_ANGLE = Math.PI * (3 - Math.sqrt(5));

/**
 * Points spread evenly (equal areas) over a cone, the same each time: a Fibonacci spiral on the cap.
 *
 * @param lon longitude of the axis, radians
 * @param lat latitude of the axis, radians
 * @param radius half angle, radians, in [0, π]
 * @param count number of points, at least 1
 * @returns longitude and latitude of each point, radians, flat in pairs; all within the cone
 * @throws {DomainError} for arguments out of range
 *
 * Source: spiral point sets, e.g. Swinbank & Purser (2006), QJRMS 132, 1769 (from memory).
 */
export function capPoints(lon: number, lat: number, radius: number, count: number): Float64Array {
  assertDirection('capPoints', lon, lat);
  if (!(radius >= 0 && radius <= Math.PI) || !Number.isInteger(count) || count < 1) {
    throw new DomainError(`capPoints: expected a radius in [0, π] and a count >= 1, got ${radius} and ${count}`);
  }
  const [ax, ay, az] = toVector(lon, lat);
  const sinLon = Math.sin(lon);
  const cosLon = Math.cos(lon);
  const cap = 2 * Math.sin(radius / 2) ** 2;
  const points = new Float64Array(2 * count);
  for (let i = 0; i < count; i++) {
    // 1 - cos θ grows evenly with the area; kept as such it has all its digits for small cones.
    const dip = (cap * (i + 0.5)) / count;
    const across = Math.sqrt(dip * (2 - dip));
    const east = across * Math.sin(i * GOLDEN_ANGLE);
    const north = across * Math.cos(i * GOLDEN_ANGLE);
    const x = ax * (1 - dip) - east * sinLon - north * az * cosLon;
    const y = ay * (1 - dip) + east * cosLon - north * az * sinLon;
    const z = az * (1 - dip) + north * Math.cos(lat);
    points[2 * i] = wrapTurn(Math.atan2(y, x));
    points[2 * i + 1] = Math.atan2(z, Math.sqrt(x * x + y * y));
  }
  return points;
}
