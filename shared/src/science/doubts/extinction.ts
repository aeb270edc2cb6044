import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { doubt, inWords } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';

export interface ExtinctionInput {
  /** SFD98 E(B-V), mag; NaN where no table gives it. */
  ebvMag: number;
  galacticLatRad: number;
}

const UNTESTABLE_MAG = 0.3;
const WATCH_MAG = 0.1;
const UNTESTABLE_LAT = 10;

const RULE: DoubtRule = {
  name: 'extinction',
  rule: `not testable in the optical and the ultraviolet if E(B-V) > ${UNTESTABLE_MAG} or |b| < ${UNTESTABLE_LAT} deg; watch if E(B-V) > ${WATCH_MAG}`,
  source: 'common practice; Schlafly & Finkbeiner (2011)',
};

/**
 * Doubt that Galactic dust, or the crowd of stars in the plane, hides the counterpart.
 *
 * @param input E(B-V) and latitude
 * @returns the doubt; its value is E(B-V), mag. The near infrared may still be tested.
 * @throws {DomainError} if E(B-V) is negative
 */
export function extinctionDoubt(input: ExtinctionInput): Doubt {
  const { ebvMag, galacticLatRad } = input;
  if (ebvMag < 0) throw new DomainError(`extinctionDoubt: E(B-V) must not be negative, got ${ebvMag}`);
  const latitude = Math.abs(galacticLatRad) / DEGREE;
  const say = (grade: Doubt['grade'], sentence: string) => doubt(RULE, grade, sentence, ebvMag, 'mag');
  if (latitude < UNTESTABLE_LAT) {
    return say(
      'not testable here',
      `The source is ${inWords(latitude)} degrees from the Galactic plane: only the near infrared can be tested.`,
    );
  }
  if (!Number.isFinite(ebvMag)) return say('not testable here', 'No E(B-V) is given for this place.');
  if (ebvMag > UNTESTABLE_MAG)
    return say('not testable here', `E(B-V) is ${inWords(ebvMag)} mag: only the near infrared can be tested.`);
  if (ebvMag > WATCH_MAG)
    return say('watch', `E(B-V) is ${inWords(ebvMag)} mag: limits in the blue and the ultraviolet are weak.`);
  return say('clear', `E(B-V) is ${inWords(ebvMag)} mag.`);
}
