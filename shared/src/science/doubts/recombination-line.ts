import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { doubt, inWords } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';
import { czIfHydrogen, recombinationFrequency } from './line-frequencies.ts';

export interface RecombinationInput {
  /** Optical barycentric cz of the line read as HI, km/s; NaN where missing. */
  czKms: number;
  /** Width at half the peak, km/s; NaN where missing (then 0). */
  width50Kms: number;
  galacticLatRad: number;
  /** Continuum within the beam, mJy; NaN where no catalogue tells. */
  continuumMjy: number;
}

/** Galactic ionised gas moves within this of zero, km/s. */
const GALACTIC_KMS = 150;
const PLANE_DEG = 2;
const CONTINUUM_MJY = 50;

const RULE: DoubtRule = {
  name: 'recombination line',
  rule: `a Galactic Hn-alpha line (n 160-180) within W50/2 + ${GALACTIC_KMS} km/s and |b| < ${PLANE_DEG} deg: serious with continuum over ${CONTINUUM_MJY} mJy in the beam, watch where the continuum is unknown; else clear`,
  source: 'Rydberg formula; common practice',
};

/**
 * Doubt that the line is a hydrogen recombination line of Galactic ionised gas.
 *
 * @param input velocity, width, latitude and continuum
 * @returns the doubt; its value is the distance to the nearest such line, km/s
 * @throws {DomainError} if the latitude is not finite
 *
 * Method: doubts.
 */
export function recombinationLine(input: RecombinationInput): Doubt {
  const { czKms, width50Kms, galacticLatRad, continuumMjy } = input;
  if (!Number.isFinite(galacticLatRad)) {
    throw new DomainError(`recombinationLine: latitude must be finite, got ${galacticLatRad} rad`);
  }
  if (!Number.isFinite(czKms)) return doubt(RULE, 'not testable here', 'The detection has no velocity.');
  let nearest = { n: 0, offset: Infinity };
  for (let n = 160; n <= 180; n++) {
    const offset = czKms - czIfHydrogen(recombinationFrequency(n));
    if (Math.abs(offset) < Math.abs(nearest.offset)) nearest = { n, offset };
  }
  const reach = GALACTIC_KMS + (width50Kms > 0 ? width50Kms / 2 : 0);
  const near = Math.abs(nearest.offset) <= reach;
  const inPlane = Math.abs(galacticLatRad) < PLANE_DEG * DEGREE;
  const where = `H${nearest.n} alpha of Galactic gas is ${inWords(Math.abs(nearest.offset))} km/s away`;
  const say = (grade: Doubt['grade'], sentence: string) => doubt(RULE, grade, sentence, nearest.offset, 'km/s');
  if (!near) return say('clear', `${where}.`);
  if (!inPlane)
    return say(
      'clear',
      `${where}, but the source is ${inWords(Math.abs(galacticLatRad) / DEGREE)} degrees from the plane.`,
    );
  if (continuumMjy > CONTINUUM_MJY && continuumMjy < Infinity)
    return say('serious', `${where}, in the plane and with ${inWords(continuumMjy)} mJy of continuum in the beam.`);
  if (Number.isFinite(continuumMjy)) return say('clear', `${where}, but there is no strong continuum in the beam.`);
  return say('watch', `${where} in the plane; the continuum is not known.`);
}
