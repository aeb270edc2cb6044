import { DEGREE } from '../constants.ts';
import type { Direction } from './direction.ts';
import { aboutAxis, type Matrix, multiply, rotate, transpose } from './rotation.ts';

/** North Galactic pole in ICRS and Galactic longitude of the north celestial pole, degrees. */
const POLE_RA_DEG = 192.85947789478;
const POLE_DEC_DEG = 27.12825241497;
const CELESTIAL_POLE_L_DEG = 122.93192525542;

const ICRS_TO_GALACTIC: Matrix = multiply(
  aboutAxis('z', (180 - CELESTIAL_POLE_L_DEG) * DEGREE),
  multiply(aboutAxis('y', (90 - POLE_DEC_DEG) * DEGREE), aboutAxis('z', POLE_RA_DEG * DEGREE)),
);
const GALACTIC_TO_ICRS = transpose(ICRS_TO_GALACTIC);

/**
 * Galactic longitude and latitude of an ICRS direction.
 *
 * @param ra right ascension (ICRS), radians
 * @param dec declination (ICRS), radians
 * @returns `lon` = l in [0, 2π) and `lat` = b, radians
 * @throws {DomainError} for a direction out of range
 *
 * Libraries that start from the FK5 definition of the pole differ by up to 0.03″, harmless here.
 * Source: IAU 1958 system; pole in ICRS as carried by the FK4-FK5 conversion that astropy uses.
 */
export function toGalactic(ra: number, dec: number): Direction {
  return rotate(ICRS_TO_GALACTIC, ra, dec);
}

/**
 * ICRS direction of Galactic coordinates, the inverse of {@link toGalactic}.
 *
 * @param l Galactic longitude, radians
 * @param b Galactic latitude, radians
 * @returns `lon` = right ascension in [0, 2π) and `lat` = declination, radians
 * @throws {DomainError} for a direction out of range
 */
export function fromGalactic(l: number, b: number): Direction {
  return rotate(GALACTIC_TO_ICRS, l, b);
}
