import { DomainError } from '../domain-error.ts';
import { doubt, inWords } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';
import { HYDROXYL_MHZ, redshiftIfLine } from './line-frequencies.ts';

/** An infrared source near the detection. */
export interface InfraredSource {
  name: string;
  separationArcsec: number;
  /** W1 - W2, Vega mag; NaN where missing. */
  w1MinusW2: number;
  /** Redshift and its error; NaN where unknown. An error of NaN is taken as that of a spectrum. */
  redshift: number;
  redshiftError: number;
}

export interface HydroxylInput {
  /** Redshift of the line read as HI; NaN where the detection has none. */
  redshift: number;
  sources: readonly InfraredSource[];
  /** Radius that holds 95 per cent of the positional probability, arcsec. */
  radiusArcsec: number;
  /** Whether an infrared catalogue covers the place. */
  covered: boolean;
}

/** Redder than this in W1 - W2 (Vega) is a luminous infrared galaxy or an active nucleus. */
const RED_MAG = 0.4;
/** Agreement of a spectroscopic redshift, in (1 + z). */
const SPECTRUM_TOLERANCE = 0.003;

const RULE: DoubtRule = {
  name: 'hydroxyl',
  rule: `serious if a source with W1 - W2 > ${RED_MAG} within r95 has the redshift of OH 1667; watch if its redshift is unknown; clear if there is none`,
  source: 'Suess et al. (2016), MNRAS 459, 220; Roberts, Darling & Baker (2021)',
};

/**
 * Doubt that the line is a hydroxyl megamaser at z near 0.2.
 *
 * @param input the line's redshift and the infrared sources around it
 * @returns the doubt; its value is the redshift the line would have as OH 1667 MHz
 * @throws {DomainError} if the redshift is -1 or less
 *
 * A true dark source has no luminous mid-infrared source; a silent infrared catalogue therefore clears it.
 *
 * Method: doubts.
 */
export function hydroxyl(input: HydroxylInput): Doubt {
  const { redshift, sources, radiusArcsec, covered } = input;
  if (redshift <= -1) throw new DomainError(`hydroxyl: redshift must be above -1, got ${redshift}`);
  if (!Number.isFinite(redshift)) return doubt(RULE, 'not testable here', 'The detection has no velocity.');
  if (!(radiusArcsec > 0 && radiusArcsec < Infinity)) {
    return doubt(RULE, 'not testable here', 'The position error of the detection is not known.');
  }
  const asHydroxyl = redshiftIfLine(HYDROXYL_MHZ.main1667, redshift);
  const say = (grade: Doubt['grade'], sentence: string) => doubt(RULE, grade, sentence, asHydroxyl, 'redshift');
  const red = sources.filter(
    (s) => s.separationArcsec <= radiusArcsec && s.w1MinusW2 > RED_MAG && s.w1MinusW2 < Infinity,
  );

  const agreeing = red.find((s) => {
    const tolerance = Number.isFinite(s.redshiftError)
      ? Math.max(2 * s.redshiftError, SPECTRUM_TOLERANCE * (1 + asHydroxyl))
      : SPECTRUM_TOLERANCE * (1 + asHydroxyl);
    return Math.abs(s.redshift - asHydroxyl) <= tolerance;
  });
  const z = asHydroxyl.toFixed(4);
  if (agreeing)
    return say(
      'serious',
      `${agreeing.name} is infrared-red and at z ${agreeing.redshift.toFixed(3)}, where hydroxyl would be (z ${z}).`,
    );
  const open = red.find((s) => !Number.isFinite(s.redshift));
  if (open)
    return say(
      'watch',
      `${open.name} is infrared-red (W1 - W2 ${inWords(open.w1MinusW2)}) and has no redshift; as hydroxyl the line is at z ${z}.`,
    );
  if (!covered)
    return say('not testable here', `No infrared catalogue covers the place; as hydroxyl the line would be at z ${z}.`);
  return say('clear', `No infrared-red source that could be at z ${z} lies within ${inWords(radiusArcsec)} arcsec.`);
}
