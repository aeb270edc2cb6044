import type { controlResult } from '@eremite/shared/contracts/run';
import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { chanceFraction, correctedCounts } from '@eremite/shared/science/robustness/control';
import { CONTROL_RING, controlPositions } from '@eremite/shared/science/robustness/control-positions';
import { randomStream } from '@eremite/shared/science/robustness/random';
import type { Direction } from '@eremite/shared/science/sky/direction';
import type { z } from 'zod';
import { buildZoneGrid } from '../matching/build-zone-grid.ts';
import { pairSearch } from '../matching/pair-search.ts';
import type { Detection } from './detection-table.ts';
import type { PreparedCatalogue } from './prepared-catalogue.ts';

export type ControlResult = z.output<typeof controlResult>;

/** Shifted positions in all: more would move the chance fraction by less than its error. Sources are then taken evenly. */
const MOST_POSITIONS = 30_000;
/** Shifted positions keep this far from every HI source, in beams or, without one, in search radii. Common practice. */
const CLEARANCE = 3;

/**
 * Detections moved to places where there is no HI source, each in a ring about its own, inside the same coverage.
 *
 * @returns the moved detections, numbered anew from 0
 */
export function shiftedDetections(
  detections: readonly Detection[],
  catalogues: readonly PreparedCatalogue[],
  offsetsPerSource: number,
  seed: number,
): Detection[] {
  const step = Math.max(1, Math.ceil((detections.length * offsetsPerSource) / MOST_POSITIONS));
  const shifted: Detection[] = [];
  for (let i = 0; i < detections.length; i += step) {
    const source = detections[i]!;
    const here = { lon: (((source.raDeg % 360) + 360) % 360) * DEGREE, lat: source.decDeg * DEGREE };
    const covering = catalogues.filter(({ moc }) => moc?.contains(here.lon, here.lat));
    const usable = ({ lon, lat }: Direction) => covering.every(({ moc }) => moc!.contains(lon, lat));
    const radius = source.searchArcsec * ARCSECOND;
    const ring = {
      ...CONTROL_RING,
      count: offsetsPerSource,
      outerRadii: Math.min(CONTROL_RING.outerRadii, 1.5 / radius),
    };
    if (ring.outerRadii <= ring.innerRadii) continue;
    const { positions } = controlPositions(
      here,
      radius,
      randomStream(seed, `control/${source.name}/${source.row}`),
      usable,
      ring,
    );
    for (const { lon, lat } of positions) {
      shifted.push({ ...source, position: shifted.length, raDeg: lon / DEGREE, decDeg: lat / DEGREE });
    }
  }
  return clearOfDetections(shifted, detections).map((moved, position) => ({ ...moved, position }));
}

function clearOfDetections(shifted: readonly Detection[], detections: readonly Detection[]): Detection[] {
  const grid = buildZoneGrid(
    Float64Array.from(detections, ({ raDeg }) => raDeg),
    Float64Array.from(detections, ({ decDeg }) => decDeg),
  );
  const near = pairSearch(grid, {
    raDeg: Float64Array.from(shifted, ({ raDeg }) => raDeg),
    decDeg: Float64Array.from(shifted, ({ decDeg }) => decDeg),
    radiusArcsec: Float64Array.from(
      shifted,
      ({ beam, searchArcsec }) => CLEARANCE * (beam ? beam.major : searchArcsec),
    ),
  });
  const blocked = new Set(near.position);
  return shifted.filter((_, i) => !blocked.has(i));
}

/**
 * What the shifted positions say of the run.
 *
 * @param kept shifted positions looked at
 * @param chance those at which an object was accepted
 * @param matched detections with an accepted object, of `sources`
 * @returns null where no position could be kept
 */
export function controlSummary(
  offsetsPerSource: number,
  kept: number,
  chance: number,
  matched: number,
  sources: number,
): ControlResult | null {
  if (kept === 0 || sources === 0) return null;
  const { fraction, interval } = chanceFraction(chance, kept);
  const corrected = fraction < 1 ? correctedCounts(matched, sources, fraction) : undefined;
  return {
    offsetsPerSource,
    positionsKept: kept,
    chanceMatches: chance,
    chanceFraction: fraction,
    chanceInterval: [interval.low, interval.high],
    observedFraction: matched / sources,
    trueFraction: corrected ? corrected.trueFraction : 0,
    correctedUnmatched: corrected ? corrected.withoutCounterpart : 0,
  };
}
