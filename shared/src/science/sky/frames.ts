import { ARCSECOND } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { assertDirection, type Direction, fromVector, toVector, wrapTurn } from './direction.ts';
import { fromGalactic } from './galactic.ts';
import { aboutAxis, type Matrix, multiply, rotate, transpose } from './rotation.ts';

/** Frames in which tables of sources give positions. `fk5` is equinox J2000, `b1950` is FK4 at equinox B1950. */
export const SKY_FRAMES = ['icrs', 'fk5', 'b1950', 'galactic'] as const;
export type SkyFrame = (typeof SKY_FRAMES)[number];

/** Offset of the FK5 J2000 axes from ICRS. Source: USNO Circular 179 / IERS Conventions (2003). */
const ICRS_TO_FK5: Matrix = multiply(
  aboutAxis('x', 0.0199 * ARCSECOND),
  multiply(aboutAxis('y', 0.0091 * ARCSECOND), aboutAxis('z', -0.0229 * ARCSECOND)),
);
const FK5_TO_ICRS = transpose(ICRS_TO_FK5);

/** FK4 B1950 (without E-terms) to FK5 J2000. Source: Standish (1982), A&A 115, 20; Murray (1989), A&A 218, 325. */
const B1950_TO_FK5: Matrix = [
  [0.9999256794956877, -0.0111814832204662, -0.0048590038153592],
  [0.0111814832391717, 0.9999374848933135, -0.0000271625947142],
  [0.0048590037723143, -0.000027170293744, 0.9999881946023742],
];
/** E-terms of aberration at B1950, which FK4 catalogue places include. Source: as above. */
const E_TERMS = [-1.625574151689435e-6, -3.191905371563791e-7, -1.3842906719296592e-7] as const;

function b1950ToFk5(lon: number, lat: number): Direction {
  assertDirection('toIcrs', lon, lat);
  const [x, y, z] = toVector(lon, lat);
  const [a, b, c] = E_TERMS;
  const along = x * a + y * b + z * c;
  const free = fromVector([x - a + along * x, y - b + along * y, z - c + along * z]);
  return rotate(B1950_TO_FK5, free.lon, free.lat);
}

/**
 * A direction of a declared frame in ICRS.
 *
 * @param frame frame of the direction
 * @param lon right ascension or Galactic longitude, radians
 * @param lat declination or Galactic latitude, radians
 * @returns `lon` = right ascension in [0, 2π) and `lat` = declination, radians, ICRS
 * @throws {DomainError} for an unknown frame or a direction out of range
 *
 * FK5 J2000 differs from ICRS by at most 0.03″. B1950 positions are taken at epoch B1950 without proper motion, as
 * fits galaxies: good to 0.3″ (E-terms, fictitious proper motion of the rotating FK4 system).
 */
export function toIcrs(frame: SkyFrame, lon: number, lat: number): Direction {
  switch (frame) {
    case 'icrs':
      assertDirection('toIcrs', lon, lat);
      return { lon: wrapTurn(lon), lat };
    case 'fk5':
      return rotate(FK5_TO_ICRS, lon, lat);
    case 'b1950': {
      const fk5 = b1950ToFk5(lon, lat);
      return rotate(FK5_TO_ICRS, fk5.lon, fk5.lat);
    }
    case 'galactic':
      return fromGalactic(lon, lat);
    default:
      throw new DomainError(`toIcrs: unknown frame "${String(frame)}"; known are ${SKY_FRAMES.join(', ')}`);
  }
}
