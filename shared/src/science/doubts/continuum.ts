import { doubt, inWords } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';

export interface ContinuumInput {
  /** Strongest continuum source within a beam, mJy; NaN where the catalogue has none there. */
  strongestMjy: number;
  /** Whether a continuum catalogue covers the place. */
  covered: boolean;
}

const WATCH_MJY = 50;
const SERIOUS_MJY = 100;

const RULE: DoubtRule = {
  name: 'continuum',
  rule: `watch above ${WATCH_MJY} mJy within a beam, serious above ${SERIOUS_MJY} mJy`,
  source: 'common practice: standing waves of 1-7 MHz mimic lines 200-1500 km/s wide',
};

/**
 * Doubt that ripples of a strong continuum source made the line.
 *
 * @param input strongest continuum source in the beam and coverage
 * @returns the doubt; its value is that flux density, mJy
 *
 * Method: doubts.
 */
export function continuum(input: ContinuumInput): Doubt {
  const { strongestMjy, covered } = input;
  if (Number.isFinite(strongestMjy)) {
    const grade = strongestMjy > SERIOUS_MJY ? 'serious' : strongestMjy > WATCH_MJY ? 'watch' : 'clear';
    return doubt(
      RULE,
      grade,
      `The strongest continuum source in the beam has ${inWords(strongestMjy)} mJy.`,
      strongestMjy,
      'mJy',
    );
  }
  if (!covered) return doubt(RULE, 'not testable here', 'No continuum catalogue covers the place.');
  return doubt(RULE, 'clear', 'The continuum catalogue has no source in the beam.');
}
