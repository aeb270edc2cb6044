import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { exclusiveProbabilities, type Hypotheses } from '@eremite/shared/science/counterpart/exclusive';
import { type LearntPrior, priorOf } from '@eremite/shared/science/counterpart/learn-prior';
import { dominatingObject, starlightVerdict } from '@eremite/shared/science/counterpart/starlight';
import type { CandidateRow } from './candidate-row.ts';
import type { CoveredShares } from './covered-share.ts';
import type { Detection } from './detection-table.ts';
import { galaxiesInBeam, gasToLightLimit, gasToLightOf } from './gas-and-light.ts';
import type { PreparedCatalogue } from './prepared-catalogue.ts';
import type { Assessment, SkyMask } from './scored-detection.ts';
import { weighSilence } from './silence.ts';
import { starlightThresholds } from './thresholds.ts';
import { groupObjects, weighObjects, type WeighingModel } from './weigh-objects.ts';
import { ExpectationCache } from './expectation-cache.ts';

export interface AssessmentContext {
  model: WeighingModel;
  /** Catalogues in which a counterpart is looked for. */
  catalogues: readonly PreparedCatalogue[];
  priors: readonly LearntPrior[];
  shares: CoveredShares;
}

/** Q of a detection and where it comes from. */
export function priorFor(
  detection: Detection,
  priors: readonly LearntPrior[],
  { counterpart }: CriteriaSettings,
): { prior: number; source: string } {
  if (detection.distance.kind === 'none' && Number.isFinite(detection.czKms)) {
    return { prior: counterpart.priorWithoutDistance, source: 'for detections too slow for a distance' };
  }
  const bin = priors.find(
    ({ fromLogMass, toLogMass }) => detection.logHiMass >= fromLogMass && detection.logHiMass < toLogMass,
  );
  if (bin?.learnt) {
    return {
      prior: priorOf(priors, detection.logHiMass, counterpart.priorFraction),
      source: `learnt from ${bin.detections} detections of log M_HI ${bin.fromLogMass} to ${bin.toLogMass}`,
    };
  }
  return { prior: counterpart.priorFraction, source: 'of the criteria' };
}

export type StarlightAssessment = Omit<Assessment, 'surroundings'>;

/** All of a detection's starlight: objects, silence, probabilities and verdict. */
export function assessStarlight(
  detection: Detection,
  candidates: CandidateRow[],
  masks: SkyMask[],
  { model, catalogues, priors, shares }: AssessmentContext,
): StarlightAssessment {
  const { criteria } = model;
  const expectations = new ExpectationCache(detection, model.relation);
  const objects = groupObjects(candidates);
  weighObjects(detection, objects, expectations, model, catalogues, shares);
  const silence = weighSilence(detection, catalogues, masks, expectations, criteria, shares);
  const { prior, source } = priorFor(detection, priors, criteria);
  return conclude(
    {
      detection,
      candidates,
      objects,
      expectations,
      silence,
      masks,
      prior,
      priorSource: source,
      reliability: detection.reliability,
      velocity: model.velocity,
      accepted: objects.find(({ override }) => override === 'accept') ?? null,
      claims: [],
      pieces: null,
    },
    criteria,
  );
}

/** What is weighed before anything is concluded from it. */
export type Weighed = Pick<
  StarlightAssessment,
  | 'detection'
  | 'candidates'
  | 'objects'
  | 'expectations'
  | 'silence'
  | 'masks'
  | 'prior'
  | 'priorSource'
  | 'reliability'
  | 'velocity'
  | 'accepted'
  | 'claims'
  | 'pieces'
>;

/** Probabilities and the starlight verdict from the weights of the objects. Sets the probability of each row. */
export function conclude(weighed: Weighed, criteria: CriteriaSettings): StarlightAssessment {
  const { detection, objects, silence, prior, reliability, accepted } = weighed;
  const probabilities = probabilitiesOf(weighed);
  objects.forEach((object, j) => {
    for (const row of object.rows) row.probability = probabilities.objects[j]!;
  });
  let bestIndex = -1;
  probabilities.objects.forEach((p, j) => {
    if (p > 0 && (bestIndex < 0 || p > probabilities.objects[bestIndex]!)) bestIndex = j;
  });
  const best = bestIndex < 0 ? null : objects[bestIndex]!;
  const inBeam = galaxiesInBeam(detection, objects, criteria);
  const ratio = best ? gasToLightOf(detection, best) : NaN;
  const evidence = {
    probabilities,
    power: silence.power,
    galaxiesInBeam: accepted ? 0 : inBeam.length,
    discordant: objects.map((object) => object.discordant && object !== accepted),
    claimedAway: isClaimedAway(weighed, criteria),
    inPieces: isInPieces(weighed, criteria),
    gasToLight: ratio,
  };
  const usual = starlightThresholds(criteria);
  // A person who accepts a counterpart has looked: the power of the silence does not matter.
  const thresholds = accepted ? { ...usual, minimumPower: 0 } : usual;
  const starlight = starlightVerdict(accepted ? { ...evidence, power: silence.power ?? 0 } : evidence, thresholds);
  const dominates = dominatingObject(evidence, thresholds);
  const dominating = dominates < 0 ? null : objects[dominates]!;
  const limit = dominating ? NaN : gasToLightLimit(detection, silence.best, criteria);
  return {
    ...weighed,
    prior,
    reliability,
    probabilities,
    starlight,
    best,
    dominating,
    inBeam,
    gasToLight: dominating ? ratio : limit,
    gasToLightIsLimit: !dominating,
  };
}

function probabilitiesOf({ objects, prior, silence, reliability, accepted }: Weighed): Hypotheses {
  if (accepted) {
    return {
      none: 0,
      missed: 0,
      spurious: 0,
      objects: objects.map((object) => (object === accepted ? 1 : 0)),
    };
  }
  const r = reliability >= 0 && reliability <= 1 ? reliability : 1;
  const weights = objects.map(({ weight }) => weight);
  return exclusiveProbabilities(weights, prior, silence.power ?? 0, r);
}

/** Whether a galaxy that would have been the counterpart went to another detection. */
export const isClaimedAway = (
  { claims, accepted }: Pick<StarlightAssessment, 'claims' | 'accepted'>,
  { counterpart }: CriteriaSettings,
): boolean =>
  !accepted &&
  claims.some(
    ({ alone, here, there }) =>
      alone >= counterpart.minimumProbability && here < counterpart.minimumProbability && there > here,
  );

/** Whether faint objects crowd here more than chance allows. */
export const isInPieces = ({ pieces }: Pick<StarlightAssessment, 'pieces'>, { absence }: CriteriaSettings): boolean =>
  pieces !== null && pieces.chance < absence.piecesChance;
