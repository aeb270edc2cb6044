import { DomainError } from '../domain-error.ts';

/** How the redshifts of a survey's own catalogues are spread: shares of all of them, in equal bins of cz. */
export interface VelocityHistogram {
  firstKms: number;
  widthKms: number;
  /** Share of the objects in each bin. */
  share: number[];
  objects: number;
}

/** Fewer redshifts than this tell nothing of their spread: the uniform density of the model is kept. Our choice. */
export const LEAST_REDSHIFTS = 500;
/** Bins of the histogram, km/s: wider than groups are deep, narrower than the structure of the field. Our choice. */
const WIDTH_KMS = 1000;
const FARTHEST_KMS = 90_000;

/**
 * Spread of redshifts over velocity.
 *
 * @param velocities cz of unrelated objects, km/s; those missing, below zero or beyond z = 0.3 are left out
 * @returns undefined with fewer than {@link LEAST_REDSHIFTS}
 *
 * Method: velocity.
 */
export function velocityHistogram(velocities: Iterable<number>): VelocityHistogram | undefined {
  const counts = new Array<number>(FARTHEST_KMS / WIDTH_KMS).fill(0);
  let objects = 0;
  for (const cz of velocities) {
    if (!(cz >= 0 && cz < FARTHEST_KMS)) continue;
    counts[Math.floor(cz / WIDTH_KMS)]!++;
    objects++;
  }
  if (objects < LEAST_REDSHIFTS) return undefined;
  return { firstKms: 0, widthKms: WIDTH_KMS, share: counts.map((count) => count / objects), objects };
}

/**
 * Chance density of unrelated redshifts at a velocity, per km/s.
 *
 * @param histogram measured spread
 * @param czKms velocity, km/s
 * @returns mean over the bin and its neighbours, never below half an object in the three: an empty stretch of the
 *   histogram is no proof that nothing is there
 */
export function densityAt({ firstKms, widthKms, share, objects }: VelocityHistogram, czKms: number): number {
  const middle = Math.floor((czKms - firstKms) / widthKms);
  let sum = 0;
  for (let i = middle - 1; i <= middle + 1; i++) sum += share[i] ?? 0;
  return Math.max(sum, 0.5 / objects) / (3 * widthKms);
}

/** Redshift objects in rings about detections. */
export interface RingCounts {
  objects: number;
  /** Of those, within the discordance limit of the gas velocity. */
  concordant: number;
  /** Concordant ones to be expected of the spread alone. */
  expected: number;
}

/**
 * Share of the redshift objects near detections that are at their velocity by clustering.
 *
 * @param counts objects in the rings
 * @param fallback share taken where there are few
 * @param pseudoCounts objects the fallback counts for
 * @returns in [0, 1]: s of concordant = s objects + (1 - s) expected, drawn towards the fallback
 * @throws {DomainError} for negative counts
 *
 * Method: velocity.
 */
export function clusteredShare(
  { objects, concordant, expected }: RingCounts,
  fallback: number,
  pseudoCounts: number,
): number {
  if (!(objects >= 0 && concordant >= 0 && expected >= 0 && pseudoCounts >= 0)) {
    throw new DomainError(`clusteredShare: ${concordant} of ${objects} objects, ${expected} expected`);
  }
  const free = objects - expected;
  if (!(free + pseudoCounts > 0)) return fallback;
  const share = (concordant - expected + pseudoCounts * fallback) / (Math.max(0, free) + pseudoCounts);
  return Math.min(1, Math.max(0, share));
}
