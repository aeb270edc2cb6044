import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { doubt, inWords } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';

export interface ExtinctionInput {
  /** SFD98 E(B-V), mag; NaN where no table gives it. */
  ebvMag: number;
  galacticLatRad: number;
}

export interface ExtinctionSettings {
  /** Above this E(B-V) the optical and the ultraviolet are not tested, mag. */
  maximumReddeningMag: number;
  /** Above this E(B-V) blue limits are weak, mag. */
  watchReddeningMag: number;
  /** Below this latitude the map is uncertain and the field crowded, degrees. */
  minimumLatitudeDeg: number;
}

/** Common practice. */
export const EXTINCTION_SETTINGS: ExtinctionSettings = {
  maximumReddeningMag: 0.3,
  watchReddeningMag: 0.1,
  minimumLatitudeDeg: 10,
};

/**
 * Doubt that Galactic dust, or the crowd of stars in the plane, hides the counterpart.
 *
 * @param input E(B-V) and latitude
 * @param settings thresholds
 * @returns the doubt; its value is E(B-V), mag. The near infrared may still be tested.
 * @throws {DomainError} if E(B-V) is negative or the latitude is not finite
 */
export function extinctionDoubt(input: ExtinctionInput, settings = EXTINCTION_SETTINGS): Doubt {
  const { ebvMag, galacticLatRad } = input;
  const { maximumReddeningMag, watchReddeningMag, minimumLatitudeDeg } = settings;
  if (ebvMag < 0) throw new DomainError(`extinctionDoubt: E(B-V) must not be negative, got ${ebvMag}`);
  if (!Number.isFinite(galacticLatRad)) {
    throw new DomainError(`extinctionDoubt: latitude must be finite, got ${galacticLatRad} rad`);
  }
  const rule: DoubtRule = {
    name: 'extinction',
    rule: `not testable in the optical and the ultraviolet if E(B-V) > ${maximumReddeningMag} mag or unknown; watch if E(B-V) > ${watchReddeningMag} mag or |b| < ${minimumLatitudeDeg} deg`,
    source: 'common practice; Schlafly & Finkbeiner (2011)',
  };
  const latitude = Math.abs(galacticLatRad) / DEGREE;
  const low = latitude < minimumLatitudeDeg;
  const where = low ? `, ${inWords(latitude)} degrees from the Galactic plane` : '';
  const say = (grade: Doubt['grade'], sentence: string) => doubt(rule, grade, sentence, ebvMag, 'mag');
  if (!Number.isFinite(ebvMag)) return say('not testable here', `No E(B-V) is given for this place${where}.`);
  const reddening = `E(B-V) is ${inWords(ebvMag)} mag${where}`;
  if (ebvMag > maximumReddeningMag)
    return say('not testable here', `${reddening}: only the near infrared can be tested.`);
  if (low) return say('watch', `${reddening}: the dust is uncertain and the field crowded.`);
  if (ebvMag > watchReddeningMag) return say('watch', `${reddening}: limits in the blue and the ultraviolet are weak.`);
  return say('clear', `${reddening}.`);
}
