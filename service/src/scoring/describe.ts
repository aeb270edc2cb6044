import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { Doubt } from '@eremite/shared/contracts/verdict';
import { DEGREE } from '@eremite/shared/science/constants';
import type { SurroundingsMeasures } from '@eremite/shared/contracts/surroundings-measures';
import { distanceBranches } from '@eremite/shared/science/distance/distance-branches';
import { hiMass } from '@eremite/shared/science/hydrogen/hi-mass';
import { exclusiveProbabilities } from '@eremite/shared/science/counterpart/exclusive';
import { projectedKpc } from '@eremite/shared/science/surroundings/projected-separation';
import { bandLimit } from './band-limits.ts';
import { beyondSearch } from './beyond-search.ts';
import type { EngineInput } from './engine-input.ts';
import { dataGrounds, headlineOf, surroundingsGrounds } from './other-grounds.ts';
import { rowName } from './prepared-catalogue.ts';
import type { Assessment, ScoredDetail, ScoredItem } from './scored-detection.ts';
import { starlightGrounds } from './starlight-grounds.ts';

/** A number for a contract: null where missing. */
export const orNull = (value: number): number | null => (Number.isFinite(value) ? value : null);

/** One line of the verdict list. */
export function describeItem(assessment: Assessment, doubts: Doubt[], criteria: CriteriaSettings): ScoredItem {
  const { detection, best, probabilities, surroundings } = assessment;
  const { nearest } = surroundings;
  return {
    name: detection.name,
    raDeg: detection.raDeg,
    decDeg: detection.decDeg,
    velocityKms: orNull(detection.czKms),
    width50Kms: orNull(detection.width50Kms),
    fluxJyKms: orNull(detection.fluxJyKms),
    signalToNoise: orNull(detection.signalToNoise),
    distanceMpc: orNull(detection.luminosityMpc),
    distanceErrorMpc: orNull(detection.distanceErrorMpc),
    logHiMass: orNull(detection.logHiMass),
    starlight: assessment.starlight,
    pNone: probabilities.none,
    pMissed: probabilities.missed,
    pSpurious: probabilities.spurious,
    power: assessment.silence.power,
    counterpart: best && {
      catalogueId: best.face.catalogue.input.id,
      rowId: best.face.catalogue.input.roles.columns.row[best.face.index]!,
      name: rowName(best.face.catalogue, best.face.index),
      probability: probabilities.objects[assessment.objects.indexOf(best)]!,
      separationArcsec: best.face.separationArcsec,
    },
    surroundings: surroundings.verdict,
    pAlone: surroundings.factors ? surroundings.factors.probability : null,
    nearest: nearest && {
      catalogueId: nearest.catalogue.input.id,
      rowId: nearest.catalogue.input.roles.columns.row[nearest.index]!,
      name: rowName(nearest.catalogue, nearest.index),
      separationKpc: projectedKpc(nearest.separationArcsec, detection.angularMpc),
      velocityDifferenceKms: nearest.velocityDifferenceKms,
    },
    count1Mpc500Kms: surroundings.count1Mpc500Kms,
    gasToLight: orNull(assessment.gasToLight),
    gasToLightIsLimit: assessment.gasToLightIsLimit,
    doubts: doubts
      .filter(({ grade }) => grade === 'watch' || grade === 'serious')
      .map(({ name, grade }) => ({ name, grade })),
    grounds: [
      ...beyondSearch(assessment, criteria),
      ...starlightGrounds(assessment, criteria),
      ...surroundingsGrounds(assessment, surroundings, criteria),
      ...dataGrounds(assessment),
    ],
    headline: headlineOf(assessment, doubts),
    robustness: null,
  };
}

/** A probability without the last digit of rounding. */
const within = (p: number): number => Math.min(1, Math.max(0, p));

/** Published base rates at which P(none) is shown besides the prior used. */
const OTHER_PRIORS = [0.97, 0.986, 0.995];

/** Everything behind one verdict but its candidates and neighbours. */
export function describeDetail(
  assessment: Assessment,
  doubts: Doubt[],
  measures: SurroundingsMeasures | null,
  { criteria, survey }: Pick<EngineInput, 'criteria' | 'survey'>,
): ScoredDetail {
  const { detection, surroundings, silence, objects, reliability } = assessment;
  const { distance } = detection;
  const known = distance.kind !== 'none';
  const r = reliability >= 0 && reliability <= 1 ? reliability : 1;
  const weights = objects.map(({ weight }) => weight);
  return {
    distance: {
      kind: distance.kind,
      luminosityMpc: orNull(detection.luminosityMpc),
      angularMpc: orNull(detection.angularMpc),
      errorMpc: orNull(detection.distanceErrorMpc),
      note: known
        ? [detection.distanceSource, ...distance.cautions].filter((text) => text !== '').join('; ')
        : distance.reason,
      branches: branchesOf(assessment, criteria, survey),
    },
    measures,
    positionError: {
      majorArcsec: detection.error.majorArcsec,
      minorArcsec: detection.error.minorArcsec,
      angleDeg: detection.error.angleRad / DEGREE,
      source: detection.errorSource,
    },
    beamArcsec: detection.beam,
    searchRadiusArcsec: detection.searchArcsec,
    neighbourRadiusArcsec: known ? (criteria.surroundings.radiusMpc / detection.angularMpc / DEGREE) * 3600 : null,
    limits: silence.bands.map((band) => bandLimit(detection, band, criteria)),
    doubts,
    claims: assessment.claims.map(({ object: { face }, by, separationArcsec, alone, here, there }) => ({
      galaxy: rowName(face.catalogue, face.index),
      catalogueId: face.catalogue.input.id,
      rowId: face.catalogue.input.roles.columns.row[face.index]!,
      detection: by.name,
      separationArcsec,
      alone: within(alone),
      here: within(here),
      there: within(there),
    })),
    aloneFactors: surroundings.factors && {
      noneKnown: surroundings.factors.noneKnown,
      noneUnseen: surroundings.factors.noneUnseen,
      covered: surroundings.factors.covered,
    },
    priors: OTHER_PRIORS.map((prior) => {
      const at = exclusiveProbabilities(weights, prior, silence.power ?? 0, r);
      return { prior, pNone: at.none, pMissed: at.missed };
    }),
    masks: assessment.masks.map(({ raDeg, decDeg, radiusArcsec, label }) => ({ raDeg, decDeg, radiusArcsec, label })),
  };
}

/** Every distance that the velocity may stand for; the one in use is marked, unless it was measured. */
function branchesOf(
  { detection }: Assessment,
  { distance: rule }: CriteriaSettings,
  survey: EngineInput['survey'],
): ScoredDetail['distance']['branches'] {
  const { czKms, raDeg, decDeg, distance, fluxJyKms, redshift } = detection;
  if (!Number.isFinite(czKms)) return [];
  const ra = (((raDeg % 360) + 360) % 360) * DEGREE;
  return distanceBranches(czKms, ra, decDeg * DEGREE, survey).map((branch) => ({
    name: branch.name,
    velocityKms: branch.velocityKms,
    luminosityMpc: orNull(branch.luminosityMpc),
    logHiMass:
      fluxJyKms > 0 && branch.luminosityMpc > 0
        ? Math.log10(hiMass(fluxJyKms, branch.luminosityMpc, Math.max(redshift, -0.5)))
        : null,
    used:
      distance.kind === branch.kind &&
      Math.abs(distance.velocityUsedKms - branch.velocityKms) < 1e-6 &&
      (branch.frame === null || branch.frame === rule.hubbleFrame),
    note: branch.note,
  }));
}
