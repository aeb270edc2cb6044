import { logBayesFactorOfTwo, SKY_SQUARE_ARCSEC } from './bayes-factor.ts';

/** A row near a detection, as far as merging needs it; offsets from the detection on the tangent plane. */
export interface RowPlace {
  eastArcsec: number;
  northArcsec: number;
  /** 1-D position error, arcsec. */
  sigmaArcsec: number;
  /** Half-light radius, arcsec; NaN where unknown. */
  effectiveRadiusArcsec: number;
  /** Which catalogue it is from. */
  catalogue: number;
  /** Rows of the catalogue per square arcsec. */
  density: number;
  /** Velocity, km/s; NaN where unknown. */
  czKms: number;
  /** A star by its own table. */
  isStar?: boolean;
}

/** Centres of one galaxy differ between bands by about this much, arcsec, 1-D. Our choice. */
export const CENTRING_ARCSEC = 0.5;
/** Share of the half-light radius by which the centre of a diffuse galaxy is uncertain. Common practice. */
const DIFFUSE_CENTRING = 0.3;
/** Rows of different catalogues further apart in velocity than this are two objects, km/s. Our choice. */
const SAME_VELOCITY_KMS = 500;

const centring = (row: RowPlace): number =>
  row.effectiveRadiusArcsec > 0 ? DIFFUSE_CENTRING * row.effectiveRadiusArcsec : 0;

/**
 * Groups rows of several catalogues into physical objects.
 *
 * @param rows rows near one detection, best measured first within equal claims
 * @returns number of the object of each row, from 0, in the order in which objects first appear
 *
 * Rows of one catalogue are pieces of one galaxy when one lies inside the half-light radius of the other (or the two
 * errors overlap); rows of different catalogues are one object when the posterior of the pair passes one half for the
 * density of the second catalogue. Joining is transitive within these limits but each object keeps one place: that of
 * its best-measured row, with which every further row is compared.
 *
 * Method: counterpart.
 */
export function mergeIntoObjects(rows: readonly RowPlace[]): Int32Array {
  const objects = new Int32Array(rows.length).fill(-1);
  const order = Array.from(rows.keys()).sort((a, b) => rows[a]!.sigmaArcsec - rows[b]!.sigmaArcsec || a - b);
  const heads: number[] = [];
  const owner = new Int32Array(rows.length).fill(-1);
  for (const i of order) {
    let best = -1;
    let bestDistance = Infinity;
    for (let h = 0; h < heads.length; h++) {
      const head = rows[heads[h]!]!;
      const distance = Math.hypot(rows[i]!.eastArcsec - head.eastArcsec, rows[i]!.northArcsec - head.northArcsec);
      if (distance < bestDistance && isSameObject(rows[i]!, head, distance)) {
        best = h;
        bestDistance = distance;
      }
    }
    if (best < 0) {
      best = heads.length;
      heads.push(i);
    }
    owner[i] = best;
  }
  const numbers = new Map<number, number>();
  for (let i = 0; i < rows.length; i++) {
    const head = owner[i]!;
    if (!numbers.has(head)) numbers.set(head, numbers.size);
    objects[i] = numbers.get(head)!;
  }
  return objects;
}

function isSameObject(a: RowPlace, b: RowPlace, distance: number): boolean {
  if (Math.abs(a.czKms - b.czKms) > SAME_VELOCITY_KMS) return false;
  if (a.catalogue === b.catalogue) {
    // A foreground star in front of a large galaxy is no piece of it.
    if (Boolean(a.isStar) !== Boolean(b.isStar)) return false;
    const size = Math.max(a.effectiveRadiusArcsec || 0, b.effectiveRadiusArcsec || 0);
    return distance <= Math.max(size, a.sigmaArcsec + b.sigmaArcsec);
  }
  const reach = 20 * (a.sigmaArcsec + b.sigmaArcsec + CENTRING_ARCSEC + centring(a) + centring(b));
  if (distance > reach) return false;
  const sigmaA = Math.hypot(a.sigmaArcsec, CENTRING_ARCSEC, centring(a));
  const sigmaB = Math.hypot(b.sigmaArcsec, centring(b));
  const unrelated = Math.log(SKY_SQUARE_ARCSEC * Math.min(a.density, b.density));
  return logBayesFactorOfTwo(distance, sigmaA, sigmaB) > unrelated;
}
