import { deviationVelocity } from './deviation-velocity.ts';
import { doubt, inWords } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';
import { nearbyGas } from './nearby-gas.ts';

export interface CloudInput {
  galacticLonRad: number;
  galacticLatRad: number;
  /** Velocity in the kinematic LSR, km/s; NaN where the detection has none. */
  lsrKms: number;
  /** Velocity in the Local Group frame, km/s. */
  localGroupKms: number;
  /** Width at half the peak, km/s; NaN where missing. */
  width50Kms: number;
}

export interface CloudSettings {
  /** Below this |v_LSR| gas of the Galaxy is everywhere, km/s. */
  galacticKms: number;
  /** High-velocity clouds lie below this |v_LSR|, km/s. */
  cloudVelocityKms: number;
  /** Least deviation velocity of a high-velocity cloud, km/s. */
  deviationVelocityKms: number;
  /** Above this velocity in the Local Group frame the Hubble flow is believed, km/s. */
  localGroupKms: number;
}

/** Wakker (1991) for the deviation, common practice for the others. */
export const CLOUD_SETTINGS: CloudSettings = {
  galacticKms: 100,
  cloudVelocityKms: 400,
  deviationVelocityKms: 50,
  localGroupKms: 500,
};

/** The Stream and the clouds of M31 reach this much further than the others, km/s. */
const NEARBY_EXTRA_KMS = 50;

/**
 * Doubt that the gas belongs to the Galaxy or to a high-velocity cloud.
 *
 * @param input direction, velocities and width
 * @param settings thresholds
 * @returns the doubt; its value is the deviation velocity, km/s
 * @throws {DomainError} if a direction is not finite
 *
 * A compact cloud with a narrow line (15-40 km/s) and a dwarf of the Local Group cannot be told apart without a
 * distance, so neither distance nor isolation is claimed for them.
 *
 * Method: doubts.
 */
export function cloud(input: CloudInput, settings = CLOUD_SETTINGS): Doubt {
  const { galacticKms, cloudVelocityKms, deviationVelocityKms } = settings;
  const reach = cloudVelocityKms + NEARBY_EXTRA_KMS;
  const rule: DoubtRule = {
    name: 'cloud',
    rule: `serious if |v_LSR| < ${galacticKms} km/s, or |v_LSR| < ${cloudVelocityKms} and v_dev < ${deviationVelocityKms}, or |v_LSR| < ${cloudVelocityKms} and v_LG < ${settings.localGroupKms} km/s; watch if |v_LSR| < ${cloudVelocityKms}, or <= ${reach} near the Magellanic Stream, M31 or M33; else clear`,
    source: 'Wakker (1991), A&A 250, 499; Adams et al. (2013), ApJ 768, 77; common practice',
  };
  const { galacticLonRad, galacticLatRad, lsrKms, localGroupKms, width50Kms } = input;
  if (!Number.isFinite(lsrKms)) return doubt(rule, 'not testable here', 'The detection has no velocity.');

  const deviation = deviationVelocity(galacticLonRad, galacticLatRad, lsrKms);
  const speed = Math.abs(lsrKms);
  const at = `v_LSR ${inWords(lsrKms)} km/s, ${inWords(Math.abs(deviation))} km/s beyond the Galactic disc`;
  const say = (grade: Doubt['grade'], sentence: string) => doubt(rule, grade, sentence, deviation, 'km/s');

  if (speed < galacticKms) return say('serious', `Gas of the Galaxy reaches this velocity everywhere (${at}).`);
  if (speed < cloudVelocityKms) {
    if (Math.abs(deviation) < deviationVelocityKms)
      return say('serious', `The Galactic disc reaches this velocity here (${at}).`);
    if (localGroupKms < settings.localGroupKms) {
      const narrow = width50Kms < 40 ? `; the line is only ${inWords(width50Kms)} km/s wide, as in compact clouds` : '';
      return say('serious', `A high-velocity cloud is not excluded (${at}${narrow}).`);
    }
  }
  const gas = speed <= reach ? nearbyGas(galacticLonRad, galacticLatRad) : undefined;
  if (gas) return say('watch', `Gas of the ${gas} reaches this velocity in this direction (${at}).`);
  if (speed < cloudVelocityKms)
    return say('watch', `High-velocity clouds reach this velocity, though not usually here (${at}).`);
  return say('clear', `No cloud of the Galaxy moves this fast (${at}).`);
}
