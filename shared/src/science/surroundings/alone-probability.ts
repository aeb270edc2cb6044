/** P(no neighbour) in its three factors. */
export interface AloneFactors {
  /** Share of the distance draws without a known neighbour that counts. */
  noneKnown: number;
  /** Chance that none was missed, averaged over the draws. */
  noneUnseen: number;
  /** Covered share of the neighbour circle. */
  covered: number;
  /** Mean over the draws of both together, times the covered share. */
  probability: number;
}

/** One draw of the distance: whether a known neighbour counts there, and how many are missed. */
export interface DistanceDraw {
  accompanied: boolean;
  missed: number;
}

/**
 * P(no neighbour) = mean over the draws of [none known inside the window] exp(-N_missed), times the covered share.
 *
 * @param draws equally likely distances, at least one
 * @param covered covered share of the circle, 0 to 1
 *
 * Method: surroundings.
 */
export function aloneProbability(draws: readonly DistanceDraw[], covered: number): AloneFactors {
  let known = 0;
  let unseen = 0;
  let both = 0;
  for (const { accompanied, missed } of draws) {
    const silent = Math.exp(-missed);
    if (!accompanied) known++;
    unseen += silent;
    if (!accompanied) both += silent;
  }
  const n = draws.length;
  return { noneKnown: known / n, noneUnseen: unseen / n, covered, probability: (both / n) * covered };
}
