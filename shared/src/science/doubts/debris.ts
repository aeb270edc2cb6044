import { doubt, inWords, roughly } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';

/** A galaxy that could have shed the gas. */
export interface DebrisNeighbour {
  name: string;
  /** Separation on the sky, radians. */
  separationRad: number;
  /** Its own angular-diameter distance, Mpc; NaN where unknown, then it cannot be tested. */
  distanceMpc: number;
  /** It has none of its own: `distanceMpc` is that of the detection. */
  distanceTaken?: boolean;
  /** Velocity difference (neighbour - detection) / (1 + z), km/s. */
  velocityDifferenceKms: number;
  /** log10 of its HI and stellar mass in solar masses; NaN where unknown. */
  logHiMass: number;
  logStellarMass: number;
  /** An HI bridge, or an elongation of the gas pointing at it, has been seen. */
  bridge?: boolean;
}

export interface DebrisInput {
  neighbours: readonly DebrisNeighbour[];
  /** Whether catalogues with redshifts cover the window around the detection. */
  covered: boolean;
  /** Whether the detection has a velocity. */
  hasVelocity: boolean;
}

export interface DebrisSettings {
  strong: { radiusKpc: number; windowKms: number };
  possible: { radiusKpc: number; windowKms: number };
  /** A neighbour sheds gas only above one of these, log10 solar masses. */
  minLogHiMass: number;
  minLogStellarMass: number;
}

/** Common practice. */
export const DEBRIS_SETTINGS: DebrisSettings = {
  strong: { radiusKpc: 250, windowKms: 300 },
  possible: { radiusKpc: 500, windowKms: 500 },
  minLogHiMass: 9,
  minLogStellarMass: 9.5,
};

/** The doubt together with the neighbour it names, as an index into the input. */
export interface DebrisDoubt extends Doubt {
  responsible?: number;
}

/**
 * Doubt that the gas was drawn or stripped out of a neighbour.
 *
 * @param input neighbours, with their own distances: debris lies at the neighbour's distance, not at its Hubble distance
 * @param settings the two zones and the least mass of a neighbour that can shed gas
 * @returns the doubt with the responsible neighbour; value is its projected distance, kpc
 *
 * Strong zone: serious. Possible zone: watch, or serious with a bridge. A neighbour whose mass is unknown counts for one
 * grade less. Source: common practice after the debris of NGC 4254 that was taken for a dark galaxy (Haynes et al. 2007;
 * Duc & Bournaud 2008).
 *
 * Method: doubts.
 */
export function debris(input: DebrisInput, settings = DEBRIS_SETTINGS): DebrisDoubt {
  const { strong, possible, minLogHiMass, minLogStellarMass } = settings;
  const rule: DoubtRule = {
    name: 'debris',
    rule: `serious if a neighbour of M_HI > 1e${minLogHiMass} or M* > 1e${minLogStellarMass} lies within ${strong.radiusKpc} kpc and ${strong.windowKms} km/s, or is joined by a bridge; watch within ${possible.radiusKpc} kpc and ${possible.windowKms} km/s; at the neighbour's distance`,
    source: 'common practice; Haynes et al. (2007), Duc & Bournaud (2008)',
  };
  if (!input.hasVelocity)
    return doubt(rule, 'not testable here', 'The detection has no velocity to compare with its neighbours.');

  let best: { grade: 'watch' | 'serious'; kpc: number; index: number; massive: boolean } | undefined;
  input.neighbours.forEach((neighbour, index) => {
    const kpc = neighbour.distanceMpc * 1000 * neighbour.separationRad;
    const speed = Math.abs(neighbour.velocityDifferenceKms);
    const massive = neighbour.logHiMass > minLogHiMass || neighbour.logStellarMass > minLogStellarMass;
    const unknown = !massive && !(Number.isFinite(neighbour.logHiMass) && Number.isFinite(neighbour.logStellarMass));
    // Written so that neither NaN nor a negative mark for a missing distance passes.
    const inStrong = kpc >= 0 && kpc <= strong.radiusKpc && speed <= strong.windowKms;
    const inPossible = kpc >= 0 && kpc <= possible.radiusKpc && speed <= possible.windowKms;
    if (!inPossible || !(massive || unknown)) return;
    if (unknown && !(inStrong || neighbour.bridge)) return;
    const grade = massive && (inStrong || neighbour.bridge) ? 'serious' : 'watch';
    const better = !best || (grade === best.grade ? kpc < best.kpc : grade === 'serious');
    if (better) best = { grade, kpc, index, massive };
  });

  if (best) {
    const neighbour = input.neighbours[best.index]!;
    const mass = best.massive ? '' : ', whose mass is not known';
    const bridge = neighbour.bridge ? ' and gas points to it' : '';
    const at = neighbour.distanceTaken ? 'at the distance of the gas' : 'at its own distance';
    const sentence = `${neighbour.name}${mass} is ${roughly(best.kpc)} kpc and ${inWords(Math.abs(neighbour.velocityDifferenceKms))} km/s away ${at}${bridge}: the gas may be its debris.`;
    return { ...doubt(rule, best.grade, sentence, best.kpc, 'kpc'), responsible: best.index };
  }
  if (!input.covered) {
    return doubt(rule, 'not testable here', 'No catalogue with redshifts covers the surroundings.');
  }
  return doubt(
    rule,
    'clear',
    `No galaxy able to shed gas lies within ${possible.radiusKpc} kpc and ${possible.windowKms} km/s.`,
  );
}
