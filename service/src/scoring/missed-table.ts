import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { BANDS } from '@eremite/shared/science/photometry/bands';
import {
  clusteringBoost,
  hiClustering,
  missedNeighbours,
} from '@eremite/shared/science/surroundings/missed-neighbours';
import { relationOf } from './expectation.ts';

const BRIGHTEST = -26;
const STEP = 0.05;

/** Unseen neighbours as a function of what redshifts reach, tabulated for a run. */
export class MissedTable {
  private readonly values: Float64Array;
  /** How many times more about a clustered object than in the mean field. */
  readonly boost: number;
  /** HI mass, solar masses, that goes with the faintest galaxy that counts. */
  readonly gasOfFaintest: number;

  constructor(criteria: CriteriaSettings, h0: number) {
    const { radiusMpc, velocityWindowKms, faintestNeighbourMag, ...law } = criteria.surroundings;
    const window = { radiusMpc, velocityWindowKms, h0 };
    const function_ = { phiStarH3: law.schechterPhiStarH3, mStarH: law.schechterMStarH, alpha: law.schechterAlpha };
    const steps = Math.max(1, Math.ceil((faintestNeighbourMag - BRIGHTEST) / STEP));
    this.values = Float64Array.from({ length: steps + 1 }, (_, k) =>
      missedNeighbours(BRIGHTEST + k * STEP, faintestNeighbourMag, window, function_),
    );
    this.boost = clusteringBoost(window, hiClustering(h0));
    const relation = relationOf(criteria);
    const logStellar =
      (BANDS.r.solarAb - relation.brighterMag - faintestNeighbourMag) / 2.5 + Math.log10(relation.massToLightR);
    this.gasOfFaintest = 10 ** (relation.pivotLogHi + (logStellar - relation.pivotLogStellar) / relation.slope);
  }

  /** Expected number in the mean field when redshifts reach this M_r; linear between entries. */
  at(limitAbsoluteMag: number): number {
    const place = (limitAbsoluteMag - BRIGHTEST) / STEP;
    const last = this.values.length - 1;
    if (!(place < last)) return 0;
    if (place <= 0) return this.values[0]!;
    const k = Math.floor(place);
    return this.values[k]! + (place - k) * (this.values[k + 1]! - this.values[k]!);
  }
}
