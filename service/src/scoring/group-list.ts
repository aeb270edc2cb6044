import { DEGREE, SPEED_OF_LIGHT_KMS } from '@eremite/shared/science/constants';
import { chooseDistance } from '@eremite/shared/science/distance/distance-rule';
import { separation } from '@eremite/shared/science/sky/separation';
import {
  CLUSTER_DISPERSION_KMS,
  isMember,
  r200Kpc,
  r200OfDispersionKpc,
  v200Kms,
} from '@eremite/shared/science/surroundings/group-membership';
import { projectedKpc } from '@eremite/shared/science/surroundings/projected-separation';
import { ARCSECOND } from '@eremite/shared/science/constants';
import type { Detection } from './detection-table.ts';
import type { EngineInput } from './engine-input.ts';
import { type PreparedCatalogue, rowName } from './prepared-catalogue.ts';

/** A group or cluster of a table of groups. */
export interface GroupRow {
  name: string;
  raRad: number;
  decRad: number;
  czKms: number;
  angularMpc: number;
  r200Kpc: number;
  dispersionKms: number;
  isCluster: boolean;
}

/** Taken for a group of which the table gives neither radius, mass nor dispersion. Common practice, small groups. */
const SMALL_GROUP = { r200Kpc: 300, dispersionKms: 150 };
const CLUSTER_MASS = 1e14;

/** Groups of all tables of groups; a group without a velocity or a distance cannot be tested and is left out. */
export function readGroups(catalogues: readonly PreparedCatalogue[], input: EngineInput): GroupRow[] {
  const groups: GroupRow[] = [];
  const { h0 } = input.survey;
  for (const catalogue of catalogues) {
    if (catalogue.input.kind !== 'groups') continue;
    const column = (name: string, row: number): number => {
      const values = catalogue.input.roles.columns[name];
      return values && !('kind' in values) && values[row]! > 0 ? values[row]! : NaN;
    };
    for (let i = 0; i < catalogue.rows; i++) {
      const czKms = catalogue.czKms?.[i] ?? NaN;
      if (!Number.isFinite(czKms)) continue;
      const raRad = (((catalogue.raDeg[i]! % 360) + 360) % 360) * DEGREE;
      const decRad = catalogue.decDeg[i]! * DEGREE;
      const measured = column('distanceMpc', i);
      const distance = chooseDistance(
        { czKms, raRad, decRad, ...(measured > 0 ? { measuredMpc: measured } : {}) },
        input.criteria.distance,
        input.survey,
      );
      if (distance.kind === 'none') continue;
      const mass = column('groupMassSolar', i);
      const dispersion = column('velocityDispersionKms', i);
      const radius = column('groupRadiusMpc', i);
      groups.push({
        name: rowName(catalogue, i),
        raRad,
        decRad,
        czKms,
        angularMpc: distance.angularMpc,
        r200Kpc:
          radius > 0
            ? 1000 * radius
            : mass > 0
              ? r200Kpc(mass, h0)
              : dispersion > 0
                ? r200OfDispersionKpc(dispersion, h0)
                : SMALL_GROUP.r200Kpc,
        dispersionKms:
          dispersion > 0 ? dispersion : mass > 0 ? v200Kms(mass, h0) / Math.SQRT2 : SMALL_GROUP.dispersionKms,
        isCluster: dispersion >= CLUSTER_DISPERSION_KMS || mass >= CLUSTER_MASS,
      });
    }
  }
  return groups;
}

/** A structure a detection belongs to, at the structure's own distance. */
export interface Membership {
  group: GroupRow;
  separationKpc: number;
  differenceKms: number;
}

/** Cluster before group, nearest in units of its radius first. */
export function membershipOf(detection: Detection, groups: readonly GroupRow[], reach: number): Membership | undefined {
  if (!Number.isFinite(detection.czKms)) return undefined;
  const ra = (((detection.raDeg % 360) + 360) % 360) * DEGREE;
  let best: Membership | undefined;
  for (const group of groups) {
    const differenceKms = (detection.czKms - group.czKms) / (1 + group.czKms / SPEED_OF_LIGHT_KMS);
    if (!(Math.abs(differenceKms) <= 3 * group.dispersionKms)) continue;
    const angle = separation(ra, detection.decDeg * DEGREE, group.raRad, group.decRad);
    const separationKpc = projectedKpc(angle / ARCSECOND, group.angularMpc);
    if (!isMember(group, separationKpc, differenceKms, reach)) continue;
    const nearer = best && separationKpc / group.r200Kpc < best.separationKpc / best.group.r200Kpc;
    if (!best || (group.isCluster && !best.group.isCluster) || (group.isCluster === best.group.isCluster && nearer)) {
      best = { group, separationKpc, differenceKms };
    }
  }
  return best;
}
