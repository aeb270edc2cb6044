import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { extinction } from '@eremite/shared/science/photometry/extinction';
import { type AloneFactors, aloneProbability } from '@eremite/shared/science/surroundings/alone-probability';
import { projectedKpc } from '@eremite/shared/science/surroundings/projected-separation';
import { type Surroundings, surroundingsVerdict } from '@eremite/shared/science/surroundings/surroundings-verdict';
import { numberRole } from '../tiles/role-table.ts';
import { coveredCircle } from './covered-share.ts';
import type { Detection } from './detection-table.ts';
import { type GroupRow, type Membership, membershipOf } from './group-list.ts';
import type { MissedTable } from './missed-table.ts';
import { normalQuantile } from '@eremite/shared/science/robustness/normal-quantile';
import { isStar, type PreparedCatalogue } from './prepared-catalogue.ts';
import { asR, reachAt, type RedshiftReach } from './redshift-reach.ts';

/** A row with a velocity near a detection in angle and velocity. */
export interface NeighbourRow {
  catalogue: PreparedCatalogue;
  index: number;
  separationArcsec: number;
  velocityDifferenceKms: number;
  band: string | null;
  magnitude: number;
  /** m_r (AB) without extinction; NaN where unknown. */
  magnitudeR: number;
  fluxJyKms: number;
  /** Distances of the detection, Mpc, at which the neighbour lies inside the radius: up to this one ... */
  insideBelowMpc: number;
  /** ... and from which it is luminous or gas-rich enough to count; 0 where it counts at any. */
  countsAboveMpc: number;
}

export interface SurroundingsResult {
  verdict: Surroundings;
  factors: AloneFactors | null;
  /** Rows inside the criteria's window at the nominal distance, nearest first. */
  neighbours: NeighbourRow[];
  nearest: NeighbourRow | null;
  /** The neighbour that decides `accompanied`. */
  deciding: NeighbourRow | null;
  /** At the neighbour's own distance, where the detection has none. */
  decidingAtMpc: number;
  membership: Membership | null;
  count1Mpc500Kms: number | null;
  reach: RedshiftReach | null;
  /** Unseen neighbours expected: in the mean field and with clustering. */
  missed: number;
  missedClustered: number;
  covered: number | null;
  /** Depth in the Hubble flow of the velocity window, Mpc: what a redshift alone cannot tell apart. */
  windowMpc: number;
  /** Why `alone` cannot be said; empty where it could. */
  obstacles: string[];
  /** Everything the draws of the distance need. */
  pool: NeighbourRow[];
}

/** What all detections share. */
export interface SurroundingsContext {
  criteria: CriteriaSettings;
  /** km/s/Mpc. */
  h0: number;
  reaches: readonly RedshiftReach[];
  groups: readonly GroupRow[];
  missed: MissedTable;
  hasVelocities: boolean;
}

/** Gas mass over the detection's from which another HI detection counts whatever its mass. Our choice. */
const COMPARABLE_GAS = 0.25;
/** Draws of the distance: equal-probability quantiles of its error, the same for every detection. */
const DISTANCE_DRAWS = Array.from({ length: 16 }, (_, k) => normalQuantile((k + 0.5) / 16));
/** No draw comes nearer than this share of the nominal distance. */
export const LEAST_DRAW = 0.4;

/** Distances of the draws, Mpc (angular). */
export function drawnDistances({ angularMpc, distanceErrorMpc }: Detection): number[] {
  if (!(distanceErrorMpc > 0)) return [angularMpc];
  return DISTANCE_DRAWS.map((z) => Math.max(LEAST_DRAW * angularMpc, angularMpc + z * distanceErrorMpc));
}

/** Angle to search for neighbours, degrees: the window at the nearest distance of the draws. NaN without a distance. */
export function neighbourAngleDeg(detection: Detection, criteria: CriteriaSettings): number {
  const radius = Math.max(1, criteria.surroundings.radiusMpc);
  if (!(detection.angularMpc > 0)) return NaN;
  const nearest = Math.min(...drawnDistances(detection), detection.angularMpc);
  return Math.min(180, radius / nearest / DEGREE);
}

/** Looks up what the verdict needs of a row of the neighbour search. */
export function makeNeighbour(
  detection: Detection,
  catalogue: PreparedCatalogue,
  index: number,
  separationArcsec: number,
  velocityDifferenceKms: number,
  context: SurroundingsContext,
): NeighbourRow {
  const { surroundings } = context.criteria;
  const place = catalogue.bands.findIndex(({ magnitude, isLimit }) => magnitude[index]! > -90 && !isLimit?.[index]);
  const band = place < 0 ? undefined : catalogue.bands[place]!;
  const magnitude = band ? band.magnitude[index]! : NaN;
  const dust =
    band?.id && detection.ebvMag > 0 && band.extinction !== 'already-corrected'
      ? extinction(band.id, detection.ebvMag)
      : 0;
  const magnitudeR = band ? asR(magnitude - dust, band.id, band.toAb) : NaN;
  const fluxJyKms = numberRole(catalogue.input.roles, 'fluxJyKms')?.[index] ?? NaN;
  const angle = separationArcsec * ARCSECOND;
  const elsewhere = isElsewhere(detection, catalogue, index, surroundings.radiusMpc);
  return {
    catalogue,
    index,
    separationArcsec,
    velocityDifferenceKms,
    band: band ? band.name : null,
    magnitude,
    magnitudeR,
    fluxJyKms,
    insideBelowMpc: angle > 0 ? surroundings.radiusMpc / angle : Infinity,
    countsAboveMpc: elsewhere ? Infinity : countsAbove(detection, catalogue, magnitudeR, fluxJyKms, context),
  };
}

/** Fractional error of a measured distance without one of its own. Common practice. */
const UNSTATED_ERROR = 0.1;

/** Whether both have measured distances, and these differ by more than the radius and three times their errors. */
function isElsewhere(
  { distance, angularMpc, distanceErrorMpc }: Detection,
  catalogue: PreparedCatalogue,
  index: number,
  radiusMpc: number,
): boolean {
  if (distance.kind !== 'measured') return false;
  const own = numberRole(catalogue.input.roles, 'distanceMpc')?.[index] ?? NaN;
  const stated = numberRole(catalogue.input.roles, 'distanceErrorMpc')?.[index] ?? NaN;
  const error = Math.hypot(distanceErrorMpc, stated > 0 ? stated : UNSTATED_ERROR * own);
  return Math.abs(own - angularMpc) > radiusMpc + 3 * error;
}

function countsAbove(
  detection: Detection,
  catalogue: PreparedCatalogue,
  magnitudeR: number,
  fluxJyKms: number,
  { criteria, missed }: SurroundingsContext,
): number {
  if (catalogue.input.kind === 'hi') {
    if (!(fluxJyKms > 0) || fluxJyKms >= COMPARABLE_GAS * detection.fluxJyKms) return 0;
    return Math.sqrt(missed.gasOfFaintest / (2.356e5 * fluxJyKms));
  }
  // A galaxy of unknown brightness counts: its velocity alone says that something is there.
  if (Number.isNaN(magnitudeR)) return 0;
  return 10 ** ((magnitudeR - criteria.surroundings.faintestNeighbourMag - 25) / 5);
}

const counts = (row: NeighbourRow, distanceMpc: number): boolean =>
  distanceMpc <= row.insideBelowMpc && distanceMpc >= row.countsAboveMpc;

/** Whether its own measured distance puts a row elsewhere along the line of sight. */
export const isElsewhereAlong = (row: NeighbourRow): boolean => row.countsAboveMpc === Infinity;

/** The nearest row that counts as a neighbour were the detection at this distance. */
export const neighbourAt = (rows: readonly NeighbourRow[], distanceMpc: number): NeighbourRow | undefined =>
  rows.find((row) => counts(row, distanceMpc));

/** Whether a known neighbour counts were the detection at this distance. */
export function isAccompaniedAt(rows: readonly NeighbourRow[], distanceMpc: number): boolean {
  return rows.some((row) => counts(row, distanceMpc));
}

/**
 * Judges the surroundings of one detection.
 *
 * @param found rows of the neighbour search, nearest first, within the widest window
 * @param isOwn whether a row is the detection itself or its counterpart
 * @param farNearest nearest row beyond the window, where the caller has looked further
 */
export function judgeSurroundings(
  detection: Detection,
  found: readonly NeighbourRow[],
  isOwn: (row: NeighbourRow) => boolean,
  farNearest: NeighbourRow | null,
  context: SurroundingsContext,
): SurroundingsResult {
  const { criteria, reaches, groups } = context;
  const rules = criteria.surroundings;
  const others = found.filter((row) => !isOwn(row) && !isStar(row.catalogue, row.index));
  const inWindow = others.filter((row) => Math.abs(row.velocityDifferenceKms) <= rules.velocityWindowKms);
  const membership = membershipOf(detection, groups, rules.clusterRadiusMpc) ?? null;
  const { angularMpc } = detection;
  const hasDistance = angularMpc > 0;
  const neighbours = hasDistance ? inWindow.filter((row) => angularMpc <= row.insideBelowMpc) : [];
  let deciding = neighbours.find((row) => counts(row, angularMpc)) ?? null;
  let decidingAtMpc = NaN;
  if (!hasDistance) {
    for (const row of inWindow) {
      const own = numberRole(row.catalogue.input.roles, 'distanceMpc')?.[row.index] ?? NaN;
      if (!deciding && own > 0 && counts(row, own)) {
        deciding = row;
        decidingAtMpc = own;
      }
    }
  }
  const reach = reachAt(reaches, detection) ?? null;
  const covered = hasDistance && reach ? coveredWindow(detection, reach, rules.radiusMpc) : null;
  const obstacles = obstaclesOf(detection, reach, covered, context);
  let factors: AloneFactors | null = null;
  let missed = NaN;
  if (hasDistance && reach) {
    const dust = detection.ebvMag > 0 ? extinction('r', detection.ebvMag) : 0;
    const missedAt = (d: number) => context.missed.at(reach.limitR - dust - 5 * Math.log10(d) - 25);
    missed = missedAt(angularMpc);
    const draws = drawnDistances(detection).map((d) => ({
      accompanied: isAccompaniedAt(inWindow, d),
      missed: missedAt(d),
    }));
    factors = aloneProbability(draws, covered ?? 0);
  }
  const verdict = surroundingsVerdict(
    {
      inCluster: membership !== null && membership.group.isCluster,
      inGroup: membership !== null,
      hasNeighbour: deciding !== null,
      aloneProbability: obstacles.length === 0 && factors ? factors.probability : null,
      covered,
    },
    rules,
  );
  return {
    verdict,
    factors: covered === null ? null : factors,
    neighbours,
    nearest: hasDistance ? (inWindow[0] ?? farNearest) : null,
    deciding,
    decidingAtMpc,
    membership,
    count1Mpc500Kms: hasDistance
      ? others.filter(
          (row) => Math.abs(row.velocityDifferenceKms) <= 500 && projectedKpc(row.separationArcsec, angularMpc) <= 1000,
        ).length
      : null,
    reach,
    missed,
    missedClustered: missed * context.missed.boost,
    covered,
    windowMpc: rules.velocityWindowKms / context.h0,
    obstacles,
    pool: inWindow,
  };
}

function coveredWindow(detection: Detection, { catalogue }: RedshiftReach, radiusMpc: number): number | null {
  if (!catalogue.moc) return null;
  return coveredCircle(catalogue.moc, detection.raDeg, detection.decDeg, radiusMpc / detection.angularMpc);
}

function obstaclesOf(
  detection: Detection,
  reach: RedshiftReach | null,
  covered: number | null,
  { criteria, hasVelocities }: SurroundingsContext,
): string[] {
  const obstacles: string[] = [];
  if (!Number.isFinite(detection.czKms)) obstacles.push('the detection has no velocity');
  if (detection.distance.kind === 'none') obstacles.push(`no distance is usable: ${detection.distance.reason}`);
  if (!hasVelocities) obstacles.push('no catalogue has velocities');
  else if (!reach) {
    obstacles.push(
      'the depth to which redshifts are complete is neither stated nor can it be measured from a catalogue that covers this place',
    );
  } else if (detection.distance.kind !== 'none' && covered === null) {
    obstacles.push(
      `what ${reach.catalogue.input.name} covers is not known, so that an empty window may be an unobserved one`,
    );
  } else if (covered !== null && covered < criteria.surroundings.minimumCovered) {
    obstacles.push(
      `only ${(100 * covered).toFixed(0)} per cent of the neighbour circle is covered by ${reach.catalogue.input.name}, under ${100 * criteria.surroundings.minimumCovered}`,
    );
  }
  return obstacles;
}
