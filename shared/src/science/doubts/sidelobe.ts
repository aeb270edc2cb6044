import { doubt, inWords } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';

/** Another HI source near the detection. */
export interface SidelobeSource {
  name: string;
  separationArcmin: number;
  /** Difference of the line centres, km/s. */
  velocityDifferenceKms: number;
  /** Its flux, Jy km/s. */
  fluxJyKms: number;
  /** Its width at half the peak, km/s; NaN where missing. */
  width50Kms: number;
}

export interface SidelobeInput {
  sources: readonly SidelobeSource[];
  /** Beam FWHM, arcmin; NaN where unknown. */
  beamArcmin: number;
  /** Flux, Jy km/s, and width, km/s, of the detection; NaN where missing. */
  fluxJyKms: number;
  width50Kms: number;
}

const NEAR = 0.5;
const FAR = 2;
const SERIOUS = 10;
const WATCH = 5;
/** Least half-window that counts as the same velocity, km/s. */
const SAME_KMS = 50;

const RULE: DoubtRule = {
  name: 'sidelobe',
  rule: `serious if a source more than ${SERIOUS} times brighter at the same velocity lies ${NEAR}-${FAR} beams away, watch if more than ${WATCH} times`,
  source: 'common practice',
};

/**
 * Doubt that the detection is the sidelobe of a stronger source at the same velocity.
 *
 * @param input other HI sources, beam and flux
 * @returns the doubt; its value is the flux ratio of the source named
 *
 * Method: doubts.
 */
export function sidelobe(input: SidelobeInput): Doubt {
  const { sources, beamArcmin, fluxJyKms, width50Kms } = input;
  if (!(beamArcmin > 0 && beamArcmin < Infinity)) return doubt(RULE, 'not testable here', 'The beam is not known.');
  if (!(fluxJyKms > 0 && fluxJyKms < Infinity))
    return doubt(RULE, 'not testable here', 'The detection has no flux to compare.');
  let worst: { source: SidelobeSource; ratio: number } | undefined;
  for (const source of sources) {
    const beams = source.separationArcmin / beamArcmin;
    const overlap = ((width50Kms || 0) + (source.width50Kms || 0)) / 2;
    const same = Math.abs(source.velocityDifferenceKms) <= Math.max(SAME_KMS, overlap);
    const ratio = source.fluxJyKms / fluxJyKms;
    if (beams >= NEAR && beams <= FAR && same && ratio > WATCH && ratio < Infinity && !(worst && worst.ratio >= ratio))
      worst = { source, ratio };
  }
  if (!worst) return doubt(RULE, 'clear', 'No much stronger source at the same velocity lies within two beams.');
  const { source, ratio } = worst;
  const grade = ratio > SERIOUS ? 'serious' : 'watch';
  return doubt(
    RULE,
    grade,
    `${source.name}, ${inWords(ratio)} times brighter at the same velocity, lies ${inWords(source.separationArcmin / beamArcmin)} beams away.`,
    ratio,
    'flux ratio',
  );
}
