import { type Direction, fromVector, toVector } from './direction.ts';
import { type SkyFrame, toIcrs } from './frames.ts';
import { toGalactic } from './galactic.ts';

/** Each step leaves about a hundredth of the difference (B1950 axes lie 0.64° off), so this ends at the last bits. */
const STEPS = 9;

/**
 * An ICRS direction in another frame: the inverse of {@link toIcrs}.
 *
 * @param frame frame of the answer
 * @param lon right ascension, radians
 * @param lat declination, radians
 * @returns longitude in [0, 2π) and latitude of the frame, radians
 * @throws {DomainError} for an unknown frame or a direction out of range
 */
export function fromIcrs(frame: SkyFrame, lon: number, lat: number): Direction {
  if (frame === 'icrs') return toIcrs('icrs', lon, lat);
  if (frame === 'galactic') return toGalactic(lon, lat);
  const [x, y, z] = toVector(lon, lat);
  let guess: [number, number, number] = [x, y, z];
  for (let step = 0; step < STEPS; step++) {
    const { lon: atLon, lat: atLat } = fromVector(guess);
    const seen = toIcrs(frame, atLon, atLat);
    const [sx, sy, sz] = toVector(seen.lon, seen.lat);
    guess = [guess[0] + x - sx, guess[1] + y - sy, guess[2] + z - sz];
  }
  return fromVector(guess);
}
