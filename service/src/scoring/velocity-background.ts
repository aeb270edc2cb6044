import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { SPEED_OF_LIGHT_KMS } from '@eremite/shared/science/constants';
import {
  clusteredShare,
  type RingCounts,
  velocityHistogram,
} from '@eremite/shared/science/counterpart/velocity-background';
import {
  DEFAULT_VELOCITY_MODEL,
  isAbsurdRedshift,
  unrelatedDensity,
  type VelocityModel,
} from '@eremite/shared/science/counterpart/velocity-term';
import { buildZoneGrid } from '../matching/build-zone-grid.ts';
import { pairSearch } from '../matching/pair-search.ts';
import type { ZoneGrid } from '../matching/zone-grid.ts';
import type { Detection } from './detection-table.ts';
import { isStar, type PreparedCatalogue } from './prepared-catalogue.ts';

/** Ring in which the share that clusters is measured: outside the search, to this many search radii. Our choice. */
const RING_RADII = 3;
const LEAST_RING_ARCSEC = 90;
/** Redshift objects in all rings together that measure it. */
const LEAST_RING_OBJECTS = 200;
/** A dense place, such as a cluster, is told by the redshifts within this, arcsec. Our choice. */
const LOCAL_ARCSEC = 1200;
/** Objects without an excess that the local share must outweigh: a chance pair is no cluster. */
const LOCAL_PSEUDO_COUNTS = 20;

/** The velocity model of the criteria, before anything is measured. */
export function velocityModelOf({ counterpart }: CriteriaSettings): VelocityModel {
  return {
    ...DEFAULT_VELOCITY_MODEL,
    clusteredFraction: counterpart.concordantClustering,
    badFraction: counterpart.badRedshiftFloor,
    discordantKms: counterpart.discordantKms,
  };
}

/** Redshifts of the searched catalogues, by place. */
export class RedshiftField {
  private readonly grid: ZoneGrid;
  private readonly czKms: Float64Array;

  constructor(catalogues: readonly PreparedCatalogue[]) {
    const usable = catalogues.map((catalogue) => usableRows(catalogue));
    const total = usable.reduce((sum, { length }) => sum + length, 0);
    const raDeg = new Float64Array(total);
    const decDeg = new Float64Array(total);
    this.czKms = new Float64Array(total);
    let at = 0;
    catalogues.forEach((catalogue, c) => {
      for (const row of usable[c]!) {
        raDeg[at] = catalogue.raDeg[row]!;
        decDeg[at] = catalogue.decDeg[row]!;
        this.czKms[at++] = catalogue.czKms![row]!;
      }
    });
    this.grid = buildZoneGrid(raDeg, decDeg);
  }

  /**
   * The model with what the survey itself tells: the spread of its redshifts, and how many near a detection share its
   * velocity without being its counterpart.
   */
  measure(model: VelocityModel, detections: readonly Detection[]): VelocityModel {
    const histogram = velocityHistogram(this.czKms);
    if (!histogram) return model;
    const spread: VelocityModel = { ...model, histogram };
    const total: RingCounts = { objects: 0, concordant: 0, expected: 0 };
    for (const ring of this.rings(detections, spread, ringRadius)) {
      total.objects += ring.objects;
      total.concordant += ring.concordant;
      total.expected += ring.expected;
    }
    if (total.objects < LEAST_RING_OBJECTS) return spread;
    return { ...spread, clusteredFraction: clusteredShare(total, 0, 0), ringObjects: total.objects };
  }

  /** The model at each detection of a range: in a dense place the share that clusters is that of the place. */
  localModels(model: VelocityModel, range: readonly Detection[]): VelocityModel[] {
    if (!model.histogram) return range.map(() => model);
    return this.rings(range, model, () => LOCAL_ARCSEC).map((ring, i) => ({
      ...model,
      backgroundDensity: unrelatedDensity(model, range[i]!.czKms),
      clusteredFraction: Math.max(model.clusteredFraction, clusteredShare(ring, 0, LOCAL_PSEUDO_COUNTS)),
    }));
  }

  /** Redshift objects between the search radius of each detection and an outer radius, arcsec. */
  private rings(
    detections: readonly Detection[],
    model: VelocityModel,
    outer: (detection: Detection) => number,
  ): RingCounts[] {
    const counts: RingCounts[] = detections.map(() => ({ objects: 0, concordant: 0, expected: 0 }));
    const found = pairSearch(this.grid, {
      raDeg: Float64Array.from(detections, ({ raDeg }) => raDeg),
      decDeg: Float64Array.from(detections, ({ decDeg }) => decDeg),
      radiusArcsec: Float64Array.from(detections, (d) => Math.max(outer(d), d.searchArcsec)),
    });
    for (let k = 0; k < found.position.length; k++) {
      const detection = detections[found.position[k]!]!;
      if (!Number.isFinite(detection.czKms) || found.separationArcsec[k]! <= detection.searchArcsec) continue;
      const ring = counts[found.position[k]!]!;
      const difference = (this.czKms[found.row[k]!]! - detection.czKms) / (1 + detection.redshift);
      ring.objects++;
      if (Math.abs(difference) <= model.discordantKms) ring.concordant++;
    }
    counts.forEach((ring, i) => {
      const { czKms, redshift } = detections[i]!;
      const window = 2 * model.discordantKms * (1 + redshift);
      ring.expected = ring.objects * Math.min(1, unrelatedDensity(model, czKms) * window);
    });
    return counts;
  }
}

/** Rows with a redshift that an unrelated galaxy can have. */
function usableRows(catalogue: PreparedCatalogue): Uint32Array {
  const { czKms } = catalogue;
  if (!czKms) return new Uint32Array(0);
  const rows = new Uint32Array(czKms.length);
  let count = 0;
  for (let i = 0; i < czKms.length; i++) {
    const cz = czKms[i]!;
    if (!Number.isFinite(cz) || isAbsurdRedshift(cz / SPEED_OF_LIGHT_KMS, 0) || isStar(catalogue, i)) continue;
    rows[count++] = i;
  }
  return rows.subarray(0, count);
}

/** What a run says of the velocity background it used. */
export function velocityNotes({ histogram, ringObjects, clusteredFraction }: VelocityModel): string[] {
  if (!histogram)
    return [
      'The spread of unrelated redshifts is taken as uniform: there are too few to measure it, or measuring is switched off.',
    ];
  const share = `${(100 * clusteredFraction).toFixed(0)} per cent of those near a detection share its velocity by clustering`;
  return [
    `The spread of unrelated redshifts is measured from ${histogram.objects} of the catalogues; ${share}, ${
      ringObjects
        ? `measured from ${ringObjects} in rings about the detections`
        : 'by the criteria, for the rings about the detections hold too few'
    }.`,
  ];
}

const ringRadius = ({ searchArcsec }: Detection): number => Math.max(LEAST_RING_ARCSEC, RING_RADII * searchArcsec);
