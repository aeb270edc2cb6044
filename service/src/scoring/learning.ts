import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { mahalanobisSquared } from '@eremite/shared/science/counterpart/position-error';
import { DEFAULT_PRIOR_LEARNING, type LearntPrior, learnPrior } from '@eremite/shared/science/counterpart/learn-prior';
import { fitLine, MINIMUM_SECURE } from '@eremite/shared/science/counterpart/learn-relation';
import type { GasStarRelation } from '@eremite/shared/science/hydrogen/gas-relation';
import { BANDS } from '@eremite/shared/science/photometry/bands';
import type { StarlightAssessment } from './assess.ts';
import { clearR } from './gas-and-light.ts';

/** What one detection teaches about the survey. */
export interface Lesson {
  logHiMass: number;
  /** How many times likelier the data are with a counterpart than without. */
  evidence: number;
  /** log10 of the stellar mass of a secure counterpart; NaN where there is none. */
  logStellarMass: number;
  /** Squared offset of a secure counterpart in units of the position error; NaN where there is none. */
  offsetSquared: number;
}

/** An object this probable, not contradicted by its redshift, teaches the relation. */
const SECURE = 0.9;

export function lessonOf(assessment: StarlightAssessment, relation: GasStarRelation): Lesson {
  const { detection, silence, objects, dominating, probabilities } = assessment;
  // Where the power is unknown nothing is learnt about the prior: one says nothing.
  const evidence = silence.power === null ? 1 : objects.reduce((sum, { weight }) => sum + weight, 1 - silence.power);
  let logStellarMass = NaN;
  let offsetSquared = NaN;
  const secure = dominating !== null && probabilities.objects[objects.indexOf(dominating)]! >= SECURE;
  if (secure && dominating.override === null) {
    const { eastArcsec, northArcsec } = dominating.head;
    offsetSquared = mahalanobisSquared(detection.covariance, eastArcsec, northArcsec);
  }
  if (secure && dominating.override === null && detection.luminosityMpc > 0) {
    const r = clearR(detection, dominating.band, dominating.magnitude);
    const absolute = r - 5 * Math.log10(detection.luminosityMpc) - 25;
    logStellarMass = Math.log10(relation.massToLightR) + (BANDS.r.solarAb - relation.brighterMag - absolute) / 2.5;
  }
  return { logHiMass: detection.logHiMass, evidence, logStellarMass, offsetSquared };
}

/** The relation refitted on secure counterparts, or undefined with too few of them. */
export function learnRelation(lessons: readonly Lesson[], relation: GasStarRelation): GasStarRelation | undefined {
  const x = lessons.map(({ logHiMass }) => logHiMass);
  const y = lessons.map(({ logStellarMass }) => logStellarMass);
  const line = fitLine(x, y, relation.pivotLogHi);
  if (!line) return undefined;
  const scaled: number[] = [];
  for (let i = 0; i < x.length; i++) {
    const apart = y[i]! - line.intercept - line.slope * (x[i]! - relation.pivotLogHi);
    if (Number.isFinite(apart))
      scaled.push(Math.abs(apart) / Math.exp(relation.scatterSlope * (x[i]! - relation.pivotLogHi)));
  }
  scaled.sort((a, b) => a - b);
  const scatterMag = 2.5 * 1.4826 * scaled[scaled.length >> 1]!;
  return {
    ...relation,
    slope: Math.min(2.5, Math.max(0.2, line.slope)),
    pivotLogStellar: line.intercept,
    // Secure matches favour what was expected, so their scatter is too small: never under the default's half.
    scatterAtPivotMag: Math.min(relation.scatterMaxMag, Math.max(relation.scatterAtPivotMag / 2, scatterMag)),
  };
}

export function learnPriors(lessons: readonly Lesson[], { counterpart }: CriteriaSettings): LearntPrior[] {
  if (!counterpart.learnPrior) return [];
  return learnPrior(
    lessons.map(({ logHiMass }) => logHiMass),
    lessons.map(({ evidence }) => evidence),
    { ...DEFAULT_PRIOR_LEARNING, fallback: counterpart.priorFraction },
  );
}

/** Sentences about what a run learnt. */
export function learntNotes(
  relation: GasStarRelation | undefined,
  priors: readonly LearntPrior[],
  lessons: readonly Lesson[],
): string[] {
  const secure = lessons.filter(({ logStellarMass }) => Number.isFinite(logStellarMass)).length;
  const notes = [
    relation
      ? `The relation of stars to gas was refitted on ${secure} secure counterparts: log M* = ${relation.pivotLogStellar.toFixed(2)} + ${relation.slope.toFixed(2)} (log M_HI - ${relation.pivotLogHi}), scatter ${relation.scatterAtPivotMag.toFixed(2)} mag at the pivot.`
      : `The relation of stars to gas is that of the criteria: ${secure} secure counterparts are fewer than the ${MINIMUM_SECURE} a refit needs, or learning is switched off.`,
  ];
  notes.push(...offsetNotes(lessons.map(({ offsetSquared }) => offsetSquared)));
  const learnt = priors.filter(({ learnt: yes }) => yes);
  notes.push(
    learnt.length > 0
      ? `The prior share with a galaxy of stars was learnt per mass: ${learnt.map((bin) => `${bin.prior.toFixed(3)} at log M_HI ${bin.fromLogMass}-${bin.toLogMass} (${bin.detections})`).join(', ')}; elsewhere that of the criteria.`
      : 'The prior share with a galaxy of stars is that of the criteria: no bin of HI mass has enough detections to learn it.',
  );
  return notes;
}

/** Median of the squared offset in units of a two-dimensional normal error: 2 ln 2. */
const EXPECTED_MEDIAN = 2 * Math.LN2;
/** Errors off by more than this factor are told of. Our choice; the wide tail alone makes 1.1. */
const TOLERATED = 1.35;

/** Whether the offsets of secure counterparts are those that the stated position errors give. */
export function offsetNotes(offsetsSquared: readonly number[]): string[] {
  const known = offsetsSquared.filter((offset) => !Number.isNaN(offset)).sort((a, b) => a - b);
  if (known.length < MINIMUM_SECURE) return [];
  const factor = Math.sqrt(known[known.length >> 1]! / EXPECTED_MEDIAN);
  const seen = `The median offset of ${known.length} secure counterparts is ${factor.toFixed(2)} times what the position errors give`;
  if (factor > TOLERATED)
    return [`${seen}: the errors are too small, and P(none) is too high where offsets are large. State larger ones.`];
  if (factor < 1 / TOLERATED) return [`${seen}: the errors are too large, and chance objects weigh too much.`];
  return [`${seen}, as it should be.`];
}
