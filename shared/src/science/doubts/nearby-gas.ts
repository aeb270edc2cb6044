import { DEGREE } from '../constants.ts';

/** Directions of gas known to reach 450 km/s in the LSR. */
const M31 = direction(121.174 * DEGREE, -21.573 * DEGREE);
const M33 = direction(133.61 * DEGREE, -31.331 * DEGREE);
/** Pole of Magellanic coordinates and the Large Cloud at their longitude zero: Nidever et al. (2008), from memory. */
const STREAM_POLE = direction(188.5 * DEGREE, -7.5 * DEGREE);
const LARGE_CLOUD = direction(280.465 * DEGREE, -32.888 * DEGREE);
/** Stream from its trailing tip to the leading arm, in Magellanic longitude, and its half-width. From memory. */
const STREAM = { from: -150 * DEGREE, to: 70 * DEGREE, halfWidth: 20 * DEGREE };
const ANDROMEDA_RADIUS = 7 * DEGREE;

type Vector = readonly [number, number, number];

/**
 * Known gas near the Galaxy in whose reach a direction lies.
 *
 * @param lonRad Galactic longitude, radians
 * @param latRad Galactic latitude, radians
 * @returns its name, or undefined
 *
 * Within 20 degrees of the Magellanic Stream and its leading arm, or 7 degrees of M31 or M33. Common practice.
 */
export function nearbyGas(lonRad: number, latRad: number): 'Magellanic Stream' | 'M31' | 'M33' | undefined {
  const here = direction(lonRad, latRad);
  if (Math.acos(dot(here, M31)) <= ANDROMEDA_RADIUS) return 'M31';
  if (Math.acos(dot(here, M33)) <= ANDROMEDA_RADIUS) return 'M33';
  const { lon, lat } = magellanic(lonRad, latRad);
  const onStream = Math.abs(lat) <= STREAM.halfWidth && lon >= STREAM.from && lon <= STREAM.to;
  return onStream ? 'Magellanic Stream' : undefined;
}

/**
 * Magellanic coordinates: latitude from the plane of the Stream, longitude 0 at the Large Cloud, negative along the tail.
 *
 * @param lonRad Galactic longitude, radians
 * @param latRad Galactic latitude, radians
 * @returns longitude in (-pi, pi] and latitude, radians. Source: Nidever et al. (2008), ApJ 679, 432, from memory.
 */
export function magellanic(lonRad: number, latRad: number): { lon: number; lat: number } {
  const here = direction(lonRad, latRad);
  const along = normalise(subtract(LARGE_CLOUD, scale(STREAM_POLE, dot(LARGE_CLOUD, STREAM_POLE))));
  const ahead = cross(STREAM_POLE, along);
  return {
    lon: Math.atan2(dot(here, ahead), dot(here, along)),
    lat: Math.asin(Math.min(1, Math.max(-1, dot(here, STREAM_POLE)))),
  };
}

function direction(lon: number, lat: number): Vector {
  return [Math.cos(lat) * Math.cos(lon), Math.cos(lat) * Math.sin(lon), Math.sin(lat)];
}
function dot(a: Vector, b: Vector): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}
function cross(a: Vector, b: Vector): Vector {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}
function scale(a: Vector, by: number): Vector {
  return [a[0] * by, a[1] * by, a[2] * by];
}
function subtract(a: Vector, b: Vector): Vector {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
}
function normalise(a: Vector): Vector {
  return scale(a, 1 / Math.hypot(...a));
}
