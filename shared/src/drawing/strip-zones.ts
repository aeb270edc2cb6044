import type { CriteriaSettings } from '../contracts/criteria.ts';
import type { DrawnDetail } from './drawn-evidence.ts';
import { ARCSEC_PER_RAD } from './panel-plane.ts';

/** Edges of the zones of the surroundings strip, kpc and km/s, with the detection at one distance. */
export interface StripZones {
  /** Distance for which they hold (angular-diameter), Mpc. */
  atMpc: number;
  kpcPerArcsec: number;
  /** Fractional error of the distance; 0 where none is known. */
  distanceFraction: number;
  counterpartKpc: number;
  debrisKpc: number;
  debrisKms: number;
  possibleDebrisKpc: number;
  possibleDebrisKms: number;
  neighbourKpc: number;
  neighbourKms: number;
}

/**
 * Zones of a detection.
 *
 * @param atMpc angular-diameter distance to draw for; the one the verdict used where absent
 * @returns undefined without a usable distance
 */
export function stripZones(detail: DrawnDetail, settings: CriteriaSettings, atMpc?: number): StripZones | undefined {
  const { angularMpc, errorMpc } = detail.distance;
  const distance = atMpc ?? angularMpc;
  if (distance === null || !(distance > 0)) return undefined;
  const kpcPerArcsec = (distance * 1000) / ARCSEC_PER_RAD;
  const { doubts, surroundings } = settings;
  return {
    atMpc: distance,
    kpcPerArcsec,
    distanceFraction: errorMpc !== null && angularMpc !== null && angularMpc > 0 ? errorMpc / angularMpc : 0,
    counterpartKpc: detail.searchRadiusArcsec * kpcPerArcsec,
    debrisKpc: doubts.strongDebrisKpc,
    debrisKms: doubts.strongDebrisKms,
    possibleDebrisKpc: doubts.possibleDebrisKpc,
    possibleDebrisKms: doubts.possibleDebrisKms,
    neighbourKpc: surroundings.radiusMpc * 1000,
    neighbourKms: surroundings.velocityWindowKms,
  };
}

/** Beyond this share a symmetric error says nothing on the far side. */
const MOST_FRACTION = 0.6;

/**
 * What the distance error does to an edge that is fixed in kpc: objects drawn between the two numbers are inside at one end
 * of the error and outside at the other, for their projected separation goes with the distance.
 *
 * @param fraction 1-sigma distance error over distance
 * @returns separations at the nominal distance, kpc: edge / (1 + f) and edge / (1 - f)
 */
export function edgeBand(edgeKpc: number, fraction: number): [number, number] {
  const f = Math.min(MOST_FRACTION, Math.max(0, fraction));
  return [edgeKpc / (1 + f), edgeKpc / (1 - f)];
}
