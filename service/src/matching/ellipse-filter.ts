import { DEGREE } from '@eremite/shared/science/constants';
import { DomainError } from '@eremite/shared/science/domain-error';
import { gather } from './gather.ts';
import type { Pairs } from './pair-search.ts';
import { raDifferenceDeg } from './separation-arcsec.ts';
import { type Numbers, wrapRaDeg } from './sky-position.ts';

/** Position errors as a covariance of each position plus, if given, a circular sigma of each row. */
export interface PairErrors {
  /** variance along east of each position, arcsec^2 */
  eastEast: Numbers;
  /** variance along north, arcsec^2 */
  northNorth: Numbers;
  /** covariance of east and north, arcsec^2 */
  eastNorth: Numbers;
  /** 1-D sigma of each row of the catalogue, arcsec; no error if not given */
  rowSigmaArcsec?: Numbers;
}

/** Pairs inside the error ellipse, in the order they came. */
export interface EllipsePairs extends Pairs {
  /** d^2 = offset^T C^-1 offset; exp(-d^2 / 2) of true counterparts lie farther out */
  mahalanobis2: Float64Array;
}

/**
 * Radius of the circle that holds the ellipse d^2 = limit, arcsec: what `pairSearch` is to be given before
 * `ellipseFilter`. The larger eigenvalue of the covariance decides; widened by 1e-9 against rounding.
 *
 * @param maxRowSigmaArcsec largest sigma of any row that may be met
 * @throws {DomainError} if the covariance is not that of an ellipse, or the limit is negative
 */
export function ellipseBoundingRadiusArcsec(
  eastEast: number,
  northNorth: number,
  eastNorth: number,
  maxMahalanobis2: number,
  maxRowSigmaArcsec = 0,
): number {
  const half = Math.hypot((eastEast - northNorth) / 2, eastNorth);
  const largest = (eastEast + northNorth) / 2 + half + maxRowSigmaArcsec ** 2;
  if (!(largest > 0) || !(maxMahalanobis2 >= 0)) {
    throw new DomainError(`no ellipse: variances ${eastEast}, ${northNorth}, ${eastNorth}, limit ${maxMahalanobis2}`);
  }
  return Math.sqrt(maxMahalanobis2 * largest) * (1 + 1e-9);
}

/**
 * Keeps the pairs whose offset lies within the error ellipse: d^2 <= limit, inclusive.
 *
 * The offset of a pair has the length of its separation and the direction of the row as seen from the position, so it
 * holds at the poles too. Source: covariance algebra; the errors of position and row are independent and add.
 *
 * @param positions positions given to the search, degrees
 * @param rows positions of the catalogue's rows, degrees
 * @throws {DomainError} if the covariance of a pair is not positive definite or an error is missing
 */
export function ellipseFilter(
  pairs: Pairs,
  positions: { raDeg: Numbers; decDeg: Numbers },
  rows: { raDeg: Numbers; decDeg: Numbers },
  errors: PairErrors,
  maxMahalanobis2: number,
): EllipsePairs {
  const kept = new Uint32Array(pairs.row.length);
  const distances = new Float64Array(pairs.row.length);
  let count = 0;
  for (let i = 0; i < pairs.row.length; i++) {
    const p = pairs.position[i]!;
    const row = pairs.row[i]!;
    const dec = positions.decDeg[p]! * DEGREE;
    const rowDec = rows.decDeg[row]! * DEGREE;
    const dRa = raDifferenceDeg(wrapRaDeg(positions.raDeg[p]!), wrapRaDeg(rows.raDeg[row]!)) * DEGREE;
    const dDec = (rows.decDeg[row]! - positions.decDeg[p]!) * DEGREE;
    const east = Math.cos(rowDec) * Math.sin(dRa);
    const north = Math.sin(dDec) + 2 * Math.sin(dec) * Math.cos(rowDec) * Math.sin(dRa / 2) ** 2;
    const length = Math.sqrt(east * east + north * north);
    const scale = length > 0 ? pairs.separationArcsec[i]! / length : 0;
    const rowVariance = errors.rowSigmaArcsec ? errors.rowSigmaArcsec[row]! ** 2 : 0;
    const d2 = mahalanobis2(
      east * scale,
      north * scale,
      errors.eastEast[p]! + rowVariance,
      errors.northNorth[p]! + rowVariance,
      errors.eastNorth[p]!,
    );
    if (Number.isNaN(d2)) throw new DomainError(`position ${p} and row ${row} have no error ellipse`);
    if (!(d2 <= maxMahalanobis2)) continue;
    kept[count] = i;
    distances[count] = d2;
    count++;
  }
  const order = kept.subarray(0, count);
  return {
    position: gather(pairs.position, order),
    row: gather(pairs.row, order),
    separationArcsec: gather(pairs.separationArcsec, order),
    mahalanobis2: distances.slice(0, count),
  };
}

/** d^2 of an offset (east, north) under a covariance; NaN if that is not positive definite. */
function mahalanobis2(east: number, north: number, ee: number, nn: number, en: number): number {
  const determinant = ee * nn - en * en;
  if (!(determinant > 0 && ee > 0)) return NaN;
  return (nn * east * east - 2 * en * east * north + ee * north * north) / determinant;
}
