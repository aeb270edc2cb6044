import { blendNumber } from './blend-probability.ts';
import { doubt, inWords, roughly } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';

export interface BlendInput {
  /** Beam FWHM, arcmin (geometric mean of the axes); NaN where unknown. */
  beamArcmin: number;
  /** Distance, Mpc; NaN where unusable. */
  distanceMpc: number;
  /** Galaxies in the beam whose known velocities lie inside the line. */
  galaxiesAtVelocity: number;
}

/** Chance of an unseen second source over which a blend is watched, and over which it is serious. Common practice. */
const WATCH = 0.05;
const SERIOUS = 0.3;

const RULE: DoubtRule = {
  name: 'blend',
  rule: `serious if two or more galaxies at the line's velocity lie in the beam, or the expected chance of another source above 1e8 solar masses within 200 km/s exceeds ${SERIOUS}; watch above ${WATCH}`,
  source: 'method after Jones et al. (2015), MNRAS 449, 1856; HI mass function of Jones et al. (2018), from memory',
};

/**
 * Doubt that the beam holds more than one source, which also pulls the centroid.
 *
 * @param input beam, distance and known galaxies at the line's velocity
 * @returns the doubt; its value is the chance of another source, or the number of known galaxies where there are several
 *
 * Method: doubts.
 */
export function blend(input: BlendInput): Doubt {
  const { beamArcmin, distanceMpc, galaxiesAtVelocity } = input;
  if (galaxiesAtVelocity >= 2) {
    return doubt(
      RULE,
      'serious',
      `${galaxiesAtVelocity} galaxies at the velocity of the line lie in the beam.`,
      galaxiesAtVelocity,
      'galaxies',
    );
  }
  if (!(beamArcmin > 0 && beamArcmin < Infinity)) return doubt(RULE, 'not testable here', 'The beam is not known.');
  if (!(distanceMpc > 0 && distanceMpc < Infinity)) {
    return doubt(
      RULE,
      'not testable here',
      'Without a distance the chance of a second source in the beam is not known.',
    );
  }
  const chance = -Math.expm1(-blendNumber(beamArcmin, distanceMpc));
  const grade = chance > SERIOUS ? 'serious' : chance > WATCH ? 'watch' : 'clear';
  return doubt(
    RULE,
    grade,
    `At ${roughly(distanceMpc)} Mpc a beam of ${inWords(beamArcmin)} arcmin holds another source with a chance of ${roughly(100 * chance)} per cent.`,
    chance,
    'probability',
  );
}
