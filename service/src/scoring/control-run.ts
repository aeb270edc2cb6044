import type { controlResult } from '@eremite/shared/contracts/run';
import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { chanceFraction, correctedCounts } from '@eremite/shared/science/robustness/control';
import {
  CONTROL_RING,
  type ControlPositions,
  controlPositions,
} from '@eremite/shared/science/robustness/control-positions';
import { randomStream } from '@eremite/shared/science/robustness/random';
import type { Direction } from '@eremite/shared/science/sky/direction';
import type { Moc } from '@eremite/shared/science/sky/moc';
import type { z } from 'zod';
import { buildZoneGrid } from '../matching/build-zone-grid.ts';
import { pairSearch } from '../matching/pair-search.ts';
import { coveredCircle } from './covered-share.ts';
import type { Detection } from './detection-table.ts';
import type { Detections } from './detections.ts';
import type { PreparedCatalogue } from './prepared-catalogue.ts';

export type ControlResult = z.output<typeof controlResult>;

/** Shifted positions in all: more would move the chance fraction by less than its error. Sources are then taken evenly. */
const MOST_POSITIONS = 30_000;
/** Shifted positions keep this far from every HI source, in beams or, without one, in search radii. Common practice. */
const CLEARANCE = 3;
/** Shares of a circle are sampled to 0.016: those of two circles are the same to three times that. */
const SAME_COVERAGE = 0.05;

/** Places to which detections are moved: the position of the detection, and the place in degrees. */
export interface ShiftedPlaces {
  source: Uint32Array;
  raDeg: Float64Array;
  decDeg: Float64Array;
}

/**
 * Places without an HI source to which detections are moved, each in a ring about its own, where every table covers as much of
 * the search circle as it does at home: what was not looked at must not count as empty.
 *
 * @param offsetsPerSource none for 0
 */
export function shiftedPlaces(
  detections: Detections,
  catalogues: readonly Pick<PreparedCatalogue, 'moc'>[],
  offsetsPerSource: number,
  seed: number,
): ShiftedPlaces {
  const shifted = controlSources(detections, offsetsPerSource, seed).flatMap(
    ({ source, here, radius, random, ring }) => {
      const covered = ({ lon, lat }: Direction, moc: Moc) =>
        coveredCircle(moc, lon / DEGREE, lat / DEGREE, Math.min(Math.PI, radius));
      const covering = catalogues.flatMap(({ moc }) => (moc ? [{ moc, share: covered(here, moc) }] : []));
      const usable = (place: Direction) =>
        covering.every(({ moc, share }) => share === 0 || covered(place, moc) >= share - SAME_COVERAGE);
      return placesOf(source, controlPositions(here, radius, random, usable, ring));
    },
  );
  const { raDeg, decDeg } = detections.places();
  const near = pairSearch(buildZoneGrid(raDeg, decDeg), {
    raDeg: Float64Array.from(shifted, (one) => one.raDeg),
    decDeg: Float64Array.from(shifted, (one) => one.decDeg),
    radiusArcsec: Float64Array.from(
      shifted,
      ({ source: { beam, searchArcsec } }) => CLEARANCE * (beam ? beam.major : searchArcsec),
    ),
  });
  const blocked = new Set(near.position);
  return pickPlaces(shifted, (i) => !blocked.has(i));
}

/** A detection that is moved, and a place it is moved to, degrees. */
interface Shifted {
  source: Detection;
  raDeg: number;
  decDeg: number;
}

const placesOf = (source: Detection, { positions }: ControlPositions): Shifted[] =>
  positions.map(({ lon, lat }) => ({ source, raDeg: lon / DEGREE, decDeg: lat / DEGREE }));

/** Detections that are moved, with the ring about each and the generator of its places. */
function controlSources(detections: Detections, offsetsPerSource: number, seed: number) {
  if (offsetsPerSource === 0 || detections.length === 0) return [];
  const step = Math.max(1, Math.ceil((detections.length * offsetsPerSource) / MOST_POSITIONS));
  const positions = Array.from({ length: Math.ceil(detections.length / step) }, (_, i) => i * step);
  return detections.pick(positions).flatMap((source) => {
    const radius = source.searchArcsec * ARCSECOND;
    const outerRadii = Math.min(CONTROL_RING.outerRadii, 1.5 / radius);
    if (outerRadii <= CONTROL_RING.innerRadii) return [];
    return [
      {
        source,
        here: { lon: (((source.raDeg % 360) + 360) % 360) * DEGREE, lat: source.decDeg * DEGREE },
        radius,
        random: randomStream(seed, `control/${source.name}/${source.row}`),
        ring: { ...CONTROL_RING, count: offsetsPerSource, outerRadii },
      },
    ];
  });
}

/** Every place that {@link shiftedPlaces} may choose, whatever the coverage turns out to be. */
export function controlCandidates(detections: Detections, offsetsPerSource: number, seed: number): Shifted[] {
  return controlSources(detections, offsetsPerSource, seed).flatMap(({ source, here, radius, random, ring }) =>
    placesOf(
      source,
      // Each try draws one place, so that the first so many places are all that can be tried.
      controlPositions(here, radius, random, () => true, { ...ring, count: ring.count * ring.tries }),
    ),
  );
}

function pickPlaces(shifted: readonly Shifted[], keep: (i: number) => boolean): ShiftedPlaces {
  const kept = shifted.filter((_, i) => keep(i));
  return {
    source: Uint32Array.from(kept, ({ source }) => source.position),
    raDeg: Float64Array.from(kept, (one) => one.raDeg),
    decDeg: Float64Array.from(kept, (one) => one.decDeg),
  };
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
