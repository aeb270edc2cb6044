import type { Hypotheses } from './exclusive.ts';

/** The starlight verdict, in the product's words. */
export type Starlight = 'dark' | 'nearly dark' | 'starlit' | 'contested' | 'confused' | 'cannot tell';

export interface StarlightThresholds {
  /** P(none) for dark. */
  darkProbability: number;
  /** P(none) + P(missed) for dark. */
  noneOrMissedProbability: number;
  /** Least power for dark and nearly dark. */
  minimumPower: number;
  /** An object at or above it dominates by itself. */
  starlitProbability: number;
  /** Below that, an object needs this much ... */
  minimumProbability: number;
  /** ... and to lead the next by this factor. */
  dominanceRatio: number;
  /** M_HI / L_r above which a starlit detection is nearly dark, solar. */
  nearlyDarkRatio: number;
}

export interface StarlightEvidence {
  probabilities: Hypotheses;
  /** c of the best band; null where no band could be tested. */
  power: number | null;
  /** Galaxies at the gas velocity inside the beam, each with a good share of the expected flux. */
  galaxiesInBeam: number;
  /** Whether the velocity of each object disagrees: such an object never makes a detection starlit by itself. */
  discordant: readonly boolean[];
  /** By itself the detection would have a counterpart, but that galaxy belongs to another detection. */
  claimedAway?: boolean;
  /** The catalogue holds more faint objects here than chance allows: a galaxy may be there in pieces. */
  inPieces?: boolean;
  /** M_HI / L_r with the most probable object as counterpart; NaN where unknown. */
  gasToLight: number;
}

/**
 * Index of the object that dominates, or -1.
 *
 * An object dominates at `starlitProbability`, or at `minimumProbability` when it leads the next object by
 * `dominanceRatio`; an object whose redshift disagrees does not.
 */
export function dominatingObject(evidence: StarlightEvidence, limits: StarlightThresholds): number {
  const { objects } = evidence.probabilities;
  let best = -1;
  let next = 0;
  for (let j = 0; j < objects.length; j++) {
    if (best < 0 || objects[j]! > objects[best]!) {
      next = best < 0 ? 0 : objects[best]!;
      best = j;
    } else if (objects[j]! > next) next = objects[j]!;
  }
  if (best < 0 || evidence.discordant[best]) return -1;
  const p = objects[best]!;
  const leads = p >= limits.minimumProbability && p >= limits.dominanceRatio * next;
  return p >= limits.starlitProbability || leads ? best : -1;
}

/**
 * The starlight verdict: rules in order, the first that holds decides, and one always does.
 *
 * 1. `confused`: two or more galaxies at the gas velocity inside the beam; no dark claim is possible until resolved.
 * 2. `nearly dark`: one object dominates and M_HI / L_r is over the limit; with too little power, `cannot tell`.
 * 3. `starlit`: one object dominates; shallow data do not matter to it.
 * 4. `contested`: objects together pass the least probability, none dominates; or the likeliest galaxy belongs to another
 *    detection, of which this gas may be a part.
 * 5. `dark`: P(none) and P(none) + P(missed) are high enough, the power suffices, and no excess of faint objects hints at a
 *    galaxy in pieces.
 * 6. `cannot tell`.
 *
 * Method: counterpart.
 */
export function starlightVerdict(evidence: StarlightEvidence, limits: StarlightThresholds): Starlight {
  const { probabilities, power } = evidence;
  const powerful = power !== null && power >= limits.minimumPower;
  if (evidence.galaxiesInBeam >= 2) return 'confused';
  if (dominatingObject(evidence, limits) >= 0) {
    if (!(evidence.gasToLight > limits.nearlyDarkRatio)) return 'starlit';
    return powerful ? 'nearly dark' : 'cannot tell';
  }
  const together = probabilities.objects.reduce((sum, p) => sum + p, 0);
  if (together >= limits.minimumProbability || evidence.claimedAway) return 'contested';
  const none = probabilities.none;
  const isDark = none >= limits.darkProbability && none + probabilities.missed >= limits.noneOrMissedProbability;
  return isDark && powerful && !evidence.inPieces ? 'dark' : 'cannot tell';
}
