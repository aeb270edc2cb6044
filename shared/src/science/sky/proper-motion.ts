import { ARCSECOND } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { assertDirection, type Direction, wrapTurn } from './direction.ts';

const MILLIARCSECOND = ARCSECOND / 1000;

/**
 * Position of a star at another epoch, by linear motion in right ascension and declination.
 *
 * @param lon right ascension at the first epoch, radians
 * @param lat declination at the first epoch, radians
 * @param pmRaMasYr proper motion in right ascension, mas/yr, already multiplied by cos δ as catalogues list it
 * @param pmDecMasYr proper motion in declination, mas/yr
 * @param years second epoch minus first, years
 * @returns direction at the second epoch, radians
 * @throws {DomainError} for values that are not finite, or a motion that would cross a pole
 *
 * Meant for masks of bright stars and the rejection of foreground stars. Within a degree of a pole, or for shifts of
 * minutes of arc, the linear form fails; neither radial velocity nor parallax is taken into account.
 * Source: definition of proper motion, e.g. ESA (1997), The Hipparcos and Tycho Catalogues, section 1.2.8.
 */
export function atEpoch(lon: number, lat: number, pmRaMasYr: number, pmDecMasYr: number, years: number): Direction {
  assertDirection('atEpoch', lon, lat);
  const east = pmRaMasYr * MILLIARCSECOND * years;
  const north = pmDecMasYr * MILLIARCSECOND * years;
  const moved = lat + north;
  if (!Number.isFinite(east) || !(Math.abs(moved) <= Math.PI / 2)) {
    throw new DomainError(
      `atEpoch: cannot move (${lon}, ${lat}) by ${pmRaMasYr}, ${pmDecMasYr} mas/yr for ${years} yr`,
    );
  }
  return { lon: wrapTurn(lon + east / Math.cos(lat)), lat: moved };
}

/**
 * Significance of a proper motion, |μ| / σ_μ. Above 3 the object is a star of our Galaxy, not a counterpart.
 *
 * @param pmRaMasYr proper motion in right ascension with cos δ, mas/yr
 * @param pmDecMasYr proper motion in declination, mas/yr
 * @param errorMasYr 1-D standard error of either component, mas/yr, > 0
 * @throws {DomainError} for values that are not finite or an error that is not positive
 */
export function properMotionSignificance(pmRaMasYr: number, pmDecMasYr: number, errorMasYr: number): number {
  const significance = Math.hypot(pmRaMasYr, pmDecMasYr) / errorMasYr;
  if (!Number.isFinite(significance) || !(errorMasYr > 0)) {
    throw new DomainError(`properMotionSignificance: got ${pmRaMasYr}, ${pmDecMasYr} with error ${errorMasYr} mas/yr`);
  }
  return significance;
}
