import type { WhatIf, WhatIfPoint } from '@eremite/shared/contracts/what-if';
import type { Engine } from '../../scoring/engine.ts';
import { packNeighbours, readNeighbours, type EvidenceCatalogue } from '../../scoring/evidence.ts';
import type { ScoredDetection } from '../../scoring/scored-detection.ts';

/** Which distances to suppose, Mpc in the meaning that the HI list gives its own. */
export interface SupposedDistances {
  fromMpc: number;
  toMpc: number;
  /** 1-sigma error over distance; null where none is known. */
  fraction: number | null;
}

/** Distances in equal steps of their logarithm. */
const STEPS = 48;
/** Distances looked at between two of which the verdicts differ, so that the change is placed to half a per cent. */
const CLOSER = 8;

const logSpaced = (from: number, to: number, steps: number): number[] =>
  Array.from({ length: steps + 1 }, (_, i) => from * (to / from) ** (i / steps));
const verdictOf = ({ item }: ScoredDetection): string => `${item.starlight}|${item.surroundings}`;

/** Verdicts of one detection over a range of distances, by the engine itself: closer together where they change. */
export function whatIfDistances(
  engine: Engine,
  position: number,
  { fromMpc, toMpc, fraction }: SupposedDistances,
  tables: readonly EvidenceCatalogue[],
): Pick<WhatIf, 'points' | 'neighbours'> {
  const scoreAt = (distances: readonly number[]) => {
    const supposed = distances.map((distanceMpc) => ({
      distanceMpc,
      errorMpc: fraction === null ? null : fraction * distanceMpc,
    }));
    return engine.scoreAt(position, supposed).map((scored, i) => ({ at: distances[i]!, scored }));
  };
  const coarse = scoreAt(logSpaced(fromMpc, toMpc, STEPS));
  const between = coarse.slice(1).flatMap((next, i) => {
    const before = coarse[i]!;
    if (verdictOf(before.scored) === verdictOf(next.scored)) return [];
    return logSpaced(before.at, next.at, CLOSER).slice(1, -1);
  });
  const all = [...coarse, ...scoreAt(between)].sort((a, b) => a.at - b.at);
  const nearest = coarse[0]!.scored;
  return {
    points: all.map(({ scored }) => pointOf(scored)),
    neighbours: readNeighbours(packNeighbours(nearest.neighbours, nearest.detection), tables),
  };
}

function pointOf({ item, detection }: ScoredDetection): WhatIfPoint {
  return {
    distanceMpc: detection.luminosityMpc,
    angularMpc: detection.angularMpc,
    logHiMass: item.logHiMass,
    searchRadiusArcsec: detection.searchArcsec,
    starlight: item.starlight,
    pNone: item.pNone,
    pMissed: item.pMissed,
    power: item.power,
    surroundings: item.surroundings,
    pAlone: item.pAlone,
    nearest: item.nearest && {
      name: item.nearest.name,
      separationKpc: item.nearest.separationKpc,
      velocityDifferenceKms: item.nearest.velocityDifferenceKms,
    },
  };
}
