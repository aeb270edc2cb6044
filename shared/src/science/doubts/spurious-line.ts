import { DomainError } from '../domain-error.ts';
import { doubt, inWords } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';

export interface SpuriousLineInput {
  /** Reliability of the detection in its list, 0-1; NaN where the list has none. */
  reliability: number;
  /** Integrated signal-to-noise ratio; NaN where missing. */
  signalToNoise: number;
}

export interface SpuriousLineSettings {
  seriousReliability: number;
  watchReliability: number;
  /** Signal-to-noise at which the list is 99 per cent complete and pure, and below which a line is not believed. */
  safeSignalToNoise: number;
  weakSignalToNoise: number;
}

/** Common practice; the owner of a list states his own. */
export const SPURIOUS_LINE_SETTINGS: SpuriousLineSettings = {
  seriousReliability: 0.95,
  watchReliability: 0.99,
  safeSignalToNoise: 6.5,
  weakSignalToNoise: 5,
};

/**
 * Doubt that the line is noise.
 *
 * @param input reliability (preferred) or signal-to-noise ratio
 * @param settings thresholds
 * @returns the doubt; `not testable here` where the list gives neither
 * @throws {DomainError} if the reliability is outside 0-1
 *
 * Lists of dark detections concentrate false ones, so the reliability of the list as a whole is too kind.
 *
 * Method: reliability.
 */
export function spuriousLine(input: SpuriousLineInput, settings = SPURIOUS_LINE_SETTINGS): Doubt {
  const { reliability, signalToNoise } = input;
  const { seriousReliability, watchReliability, safeSignalToNoise, weakSignalToNoise } = settings;
  const rule: DoubtRule = {
    name: 'spurious line',
    rule: `serious if reliability < ${seriousReliability}, watch if < ${watchReliability}; without it serious if S/N < ${weakSignalToNoise}, watch if < ${safeSignalToNoise}`,
    source: 'common practice; reliability from negative detections, Serra et al. (2012)',
  };
  if (reliability < 0 || reliability > 1)
    throw new DomainError(`spuriousLine: reliability must lie in 0-1, got ${reliability}`);
  if (Number.isFinite(reliability)) {
    const grade = reliability < seriousReliability ? 'serious' : reliability < watchReliability ? 'watch' : 'clear';
    const advice = grade === 'clear' ? '' : '; confirm the line first';
    return doubt(
      rule,
      grade,
      `The list gives the line a reliability of ${inWords(reliability)}${advice}.`,
      reliability,
    );
  }
  if (Number.isFinite(signalToNoise)) {
    const grade = signalToNoise < weakSignalToNoise ? 'serious' : signalToNoise < safeSignalToNoise ? 'watch' : 'clear';
    const advice = grade === 'clear' ? '' : '; confirm the line first';
    return doubt(
      rule,
      grade,
      `No reliability is given; the line has S/N ${inWords(signalToNoise)}${advice}.`,
      signalToNoise,
      'S/N',
    );
  }
  return doubt(rule, 'not testable here', 'The list gives neither a reliability nor a signal-to-noise ratio.');
}
