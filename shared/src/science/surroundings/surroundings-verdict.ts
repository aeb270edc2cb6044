/** The surroundings verdict, in the product's words. */
export type Surroundings = 'alone' | 'accompanied' | 'in a group' | 'in a cluster' | 'cannot tell';

export interface SurroundingsEvidence {
  inCluster: boolean;
  inGroup: boolean;
  /** A known neighbour that counts lies inside the window. */
  hasNeighbour: boolean;
  /** P(no neighbour); null where it cannot be told (no distance, depth of the redshifts unknown, coverage unknown). */
  aloneProbability: number | null;
  /** Covered share of the neighbour circle; null where unknown. */
  covered: number | null;
}

export interface SurroundingsThresholds {
  aloneProbability: number;
  minimumCovered: number;
}

/**
 * The surroundings verdict: rules in order, the first that holds decides, and one always does.
 *
 * `in a cluster`, `in a group`, `accompanied`, `alone`, else `cannot tell`. Incompleteness, edges and an unusable
 * distance can defeat only `alone`: a known neighbour at the same velocity is enough, whatever is incomplete.
 *
 * Method: surroundings.
 */
export function surroundingsVerdict(evidence: SurroundingsEvidence, thresholds: SurroundingsThresholds): Surroundings {
  if (evidence.inCluster) return 'in a cluster';
  if (evidence.inGroup) return 'in a group';
  if (evidence.hasNeighbour) return 'accompanied';
  const { aloneProbability, covered } = evidence;
  const isAlone =
    aloneProbability !== null &&
    covered !== null &&
    aloneProbability >= thresholds.aloneProbability &&
    covered >= thresholds.minimumCovered;
  return isAlone ? 'alone' : 'cannot tell';
}
