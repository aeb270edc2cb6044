import { DEGREE } from '@eremite/shared/science/constants';
import { neighbourSearch } from '../matching/neighbour-search.ts';
import type { StarlightAssessment } from './assess.ts';
import type { Detection } from './detection-table.ts';
import { buildNeighbourPool, type NeighbourPool } from './neighbour-pool.ts';
import { ownRows } from './own-rows.ts';
import type { PreparedCatalogue } from './prepared-catalogue.ts';
import { makeNeighbour, neighbourAngleDeg, type NeighbourRow, type SurroundingsContext } from './surroundings.ts';
import { MEASURED } from './surroundings-measures.ts';

/** How far beyond the window the nearest row with a velocity is still looked for, Mpc. */
const FAR_MPC = 5;
/** Without a distance: neighbours with a distance of their own, degrees. */
const NO_DISTANCE_DEG = 10;

/** Finds the rows with a velocity about detections. */
export class NeighboursAround {
  private readonly pool: NeighbourPool;

  constructor(
    private readonly catalogues: readonly PreparedCatalogue[],
    private readonly context: SurroundingsContext,
  ) {
    this.pool = buildNeighbourPool(catalogues);
  }

  /** Rows with a velocity about each assessed detection. */
  around(assessed: readonly StarlightAssessment[]): NeighbourRow[][] {
    const { criteria } = this.context;
    const window = Math.max(500, criteria.surroundings.velocityWindowKms, criteria.doubts.possibleDebrisKms);
    return this.search(
      assessed.map(({ detection }) => detection),
      (detection) => {
        const angle = neighbourAngleDeg(detection, criteria);
        return Number.isNaN(angle) && Number.isFinite(detection.czKms) ? NO_DISTANCE_DEG : angle;
      },
      window,
    );
  }

  private search(
    detections: readonly Detection[],
    angleDeg: (d: Detection) => number,
    windowKms: number,
  ): NeighbourRow[][] {
    const rows: NeighbourRow[][] = detections.map(() => []);
    const found = neighbourSearch(this.pool.grid, {
      raDeg: Float64Array.from(detections, ({ raDeg }) => raDeg),
      decDeg: Float64Array.from(detections, ({ decDeg }) => decDeg),
      czKms: Float64Array.from(detections, ({ czKms }) => czKms),
      angularRadiusDeg: Float64Array.from(detections, angleDeg),
      windowKms: new Float64Array(detections.length).fill(windowKms),
    });
    for (let k = 0; k < found.detection.length; k++) {
      const d = found.detection[k]!;
      const at = found.row[k]!;
      const catalogue = this.catalogues[this.pool.catalogue[at]!]!;
      rows[d]!.push(
        makeNeighbour(
          detections[d]!,
          catalogue,
          this.pool.row[at]!,
          found.separationArcsec[k]!,
          found.velocityDifferenceKms[k]!,
          this.context,
        ),
      );
    }
    return rows;
  }

  /** Rows as far as the measures of the surroundings look, which is further than the verdict does. */
  measured(detection: Detection): NeighbourRow[] {
    const angleDeg = Math.min(180, MEASURED.radiusMpc / detection.angularMpc / DEGREE);
    return this.search([detection], () => angleDeg, MEASURED.windowKms)[0]!;
  }

  /** The nearest row with a velocity for detections that have none in their window. */
  nearestBeyond(assessed: readonly StarlightAssessment[], around: readonly NeighbourRow[][]): (NeighbourRow | null)[] {
    const { velocityWindowKms } = this.context.criteria.surroundings;
    const { minimumProbability } = this.context.criteria.counterpart;
    const lonely: number[] = [];
    assessed.forEach((starlight, i) => {
      const own = ownRows(starlight, minimumProbability);
      const some = around[i]!.some((row) => Math.abs(row.velocityDifferenceKms) <= velocityWindowKms && !own(row));
      if (!some && starlight.detection.angularMpc > 0) lonely.push(i);
    });
    const nearest: (NeighbourRow | null)[] = assessed.map(() => null);
    if (lonely.length === 0) return nearest;
    const found = this.search(
      lonely.map((i) => assessed[i]!.detection),
      ({ angularMpc }) => Math.min(30, FAR_MPC / angularMpc / DEGREE),
      velocityWindowKms,
    );
    lonely.forEach((i, k) => {
      const own = ownRows(assessed[i]!, minimumProbability);
      nearest[i] = found[k]!.find((row) => !own(row)) ?? null;
    });
    return nearest;
  }
}
