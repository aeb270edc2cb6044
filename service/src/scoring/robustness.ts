import type { robustnessResult } from '@eremite/shared/contracts/verdict';
import { exclusiveProbabilities } from '@eremite/shared/science/counterpart/exclusive';
import { counterpartDensity } from '@eremite/shared/science/counterpart/magnitude-term';
import { type Starlight, starlightVerdict } from '@eremite/shared/science/counterpart/starlight';
import { expectedDetection } from '@eremite/shared/science/photometry/completeness';
import { wilsonInterval } from '@eremite/shared/science/robustness/intervals';
import { type Draw, drawPerturbation, NO_CHANGE, USUAL_ERRORS } from '@eremite/shared/science/robustness/perturbation';
import { randomStream } from '@eremite/shared/science/robustness/random';
import { flips, stability } from '@eremite/shared/science/robustness/stability';
import { aloneProbability } from '@eremite/shared/science/surroundings/alone-probability';
import { type Surroundings, surroundingsVerdict } from '@eremite/shared/science/surroundings/surroundings-verdict';
import { extinction } from '@eremite/shared/science/photometry/extinction';
import type { z } from 'zod';
import { isClaimedAway, isInPieces } from './assess.ts';
import { detectionSettings } from './detection-settings.ts';
import { type BandExpectation, expectIn, type Perturbation } from './expectation.ts';
import { nearestFlip } from './other-grounds.ts';
import type { Detection } from './detection-table.ts';
import { type PreparedBand, rowName } from './prepared-catalogue.ts';
import type { Assessment } from './scored-detection.ts';
import { drawnDistances, isAccompaniedAt, LEAST_DRAW, neighbourAt, type SurroundingsContext } from './surroundings.ts';
import { starlightThresholds } from './thresholds.ts';
import type { WeighingModel } from './weigh-objects.ts';

export type RobustnessResult = z.output<typeof robustnessResult>;

/** Below this P(none) + P(missed) a detection is clearly starlit and few draws will do. */
const COULD_BE_DARK = 0.1;
const FEW_DRAWS = 20;
/** Draws of a detection that could be dark but of which nothing is claimed: the interval is then 7 per cent wide at most. */
const SOME_DRAWS = 200;
/** Objects and bands that cannot matter in any draw are left at their nominal values. */
const LEAST_PROBABILITY = 1e-4;
const BANDS_REDRAWN = 2;
/** A verdict that stands in fewer draws than this is told what would flip it, whatever it claims. */
const FIRM = 0.975;

/**
 * How often the verdicts of a detection stand when what the score holds fixed is drawn from its errors: distance, flux and
 * its scale, depth, reddening, mass-to-light ratio, sizes. Positions are not drawn, for the score integrates over them.
 */
export function judgeStability(
  assessment: Assessment,
  model: WeighingModel,
  context: SurroundingsContext,
): RobustnessResult | null {
  const { draws, seed } = model.criteria.robustness;
  if (draws === 0 || assessment.accepted) return null;
  const { detection, probabilities, starlight, surroundings } = assessment;
  const open = probabilities.none + probabilities.missed >= COULD_BE_DARK;
  const random = randomStream(seed, `${detection.name}/${detection.row}`);
  const errors = {
    ...USUAL_ERRORS,
    distanceMpc: detection.angularMpc,
    distanceErrorMpc: detection.distanceErrorMpc,
    fluxFraction: detection.signalToNoise > 0 ? Math.min(0.5, 1 / detection.signalToNoise) : 0.1,
  };
  const starlightOf = starlightRedrawn(assessment, model);
  const surroundingsOf = surroundingsRedrawn(assessment, context);
  // All draws for what is claimed; few for the clearly starlit, so that a large survey can have them on.
  const claims = starlight === 'dark' || starlight === 'nearly dark';
  const start = claims ? draws : Math.min(draws, open ? SOME_DRAWS : FEW_DRAWS);
  let agreeing = 0;
  const result = stability(
    starlight,
    () => {
      const draw = drawPerturbation(random, errors);
      if (surroundingsOf(draw) === surroundings.verdict) agreeing++;
      return starlightOf(draw);
    },
    { draws: start, maximum: start },
  );
  const around = wilsonInterval(agreeing, result.draws);
  return {
    draws: result.draws,
    seed,
    starlightStability: result.agreement,
    starlightInterval: [result.interval.low, result.interval.high],
    surroundingsStability: agreeing / result.draws,
    surroundingsInterval: [around.low, around.high],
    flips: [
      ...(claims || agreeing / result.draws < FIRM ? surroundingsFlips(assessment, surroundingsOf, claims) : []),
      ...(claims || result.agreement < FIRM ? starlightFlips(assessment, starlightOf) : []),
    ],
  };
}

/** The starlight verdict under a draw: expected magnitudes, sizes and depths move together. */
function starlightRedrawn(assessment: Assessment, model: WeighingModel): (draw: Draw) => Starlight {
  const { detection, objects, silence, prior, reliability, probabilities } = assessment;
  const { criteria, relation } = model;
  const settings = detectionSettings(criteria);
  const r = reliability >= 0 && reliability <= 1 ? reliability : 1;
  const bands = silence.bands
    .filter(({ completeness, detected }) => completeness !== null && detected !== null && detected > 0)
    .sort((a, b) => b.completeness! - a.completeness!)
    .slice(0, BANDS_REDRAWN);
  const moving = objects.flatMap((object, j) => {
    const expected = object.band && assessment.expectations.in(object.band);
    if (!expected || probabilities.objects[j]! < LEAST_PROBABILITY) return [];
    return [{ j, object, nominal: counterpartDensity(expected, object.magnitude) }];
  });
  const weights = objects.map(({ weight }) => weight);
  const discordant = objects.map((object) => object.discordant);
  const claimedAway = isClaimedAway(assessment, criteria);
  const inPieces = isInPieces(assessment, criteria);
  const thresholds = starlightThresholds(criteria);
  return (draw) => {
    const perturbed: Perturbation = {
      distanceFactor: draw.distanceFactor,
      fluxFactor: draw.fluxFactor,
      reddeningFactor: draw.reddeningFactor,
      magnitudeShift: 2.5 * Math.log10(draw.massToLightFactor),
    };
    const expectations = new Map<PreparedBand, BandExpectation | undefined>();
    const expectedIn = (band: PreparedBand) => {
      if (!expectations.has(band)) expectations.set(band, expectIn(detection, band, relation, perturbed));
      return expectations.get(band);
    };
    let power: number | null = silence.power === null ? null : 0;
    for (const { band, completeness, detected: nominally } of bands) {
      const expected = expectedIn(band);
      if (!expected) continue;
      const sizes = expected.sizes.map((part) => ({ ...part, median: part.median * draw.sizeFactor }));
      const depth = { limitMag: band.depth5Sigma! + draw.depthShiftMag, fwhmArcsec: band.seeing };
      const detected = expectedDetection({ ...expected, magnitudeAb: expected.magnitude }, sizes, depth, settings);
      power = Math.max(power ?? 0, (completeness! / nominally!) * Math.min(1, detected));
    }
    for (const { j, object, nominal } of moving) {
      const expected = expectedIn(object.band!);
      weights[j] =
        expected && nominal > 0
          ? (object.weight * counterpartDensity(expected, object.magnitude)) / nominal
          : object.weight;
    }
    return starlightVerdict(
      {
        probabilities: exclusiveProbabilities(weights, prior, power ?? 0, r),
        power,
        galaxiesInBeam: assessment.inBeam.length,
        discordant,
        claimedAway,
        inPieces,
        gasToLight: assessment.gasToLightIsLimit ? NaN : assessment.gasToLight * draw.fluxFactor,
      },
      thresholds,
    );
  };
}

/** The surroundings verdict with the detection at the drawn distance; everything known about the neighbours stays. */
function surroundingsRedrawn(
  { detection, surroundings }: Assessment,
  context: SurroundingsContext,
): (draw: Draw) => Surroundings {
  const { verdict, membership, pool, reach, covered, obstacles } = surroundings;
  if (membership || !(detection.angularMpc > 0)) return () => verdict;
  const dust = detection.ebvMag > 0 ? extinction('r', detection.ebvMag) : 0;
  const nominal = drawnDistances(detection);
  return ({ distanceFactor }) => {
    const distance = detection.angularMpc * distanceFactor;
    const missedAt = (d: number) => context.missed.at(reach!.limitR - dust - 5 * Math.log10(d) - 25);
    const alone =
      reach && obstacles.length === 0 && !isAccompaniedAt(pool, distance)
        ? aloneProbability(
            nominal
              .map((d) => d * distanceFactor)
              .map((d) => ({ accompanied: isAccompaniedAt(pool, d), missed: missedAt(d) })),
            covered ?? 0,
          ).probability
        : null;
    return surroundingsVerdict(
      {
        inCluster: false,
        inGroup: false,
        hasNeighbour: isAccompaniedAt(pool, distance),
        aloneProbability: alone,
        covered,
      },
      context.criteria.surroundings,
    );
  };
}

/** Distances within three errors of the nominal one, as factors; undefined without a distance or an error of it. */
function distanceRange({ angularMpc, distanceErrorMpc }: Detection) {
  if (!(angularMpc > 0 && distanceErrorMpc > 0)) return undefined;
  const reach = Math.min(1 - LEAST_DRAW, (3 * distanceErrorMpc) / angularMpc);
  return { low: 1 - reach, high: 1 + reach };
}

const SIDES = [
  ['nearer', 'below'],
  ['further', 'above'],
] as const;

/** At which distance the verdict on neighbours would change. */
function surroundingsFlips(
  { detection, surroundings }: Assessment,
  surroundingsOf: (draw: Draw) => Surroundings,
  evenFar: boolean,
): string[] {
  const named = evenFar ? nearestFlip(detection.angularMpc, surroundings) : undefined;
  const sentences = named ? [named] : [];
  const range = distanceRange(detection);
  if (!range) return sentences;
  const found = flips(1, range, (distanceFactor) => surroundingsOf({ ...NO_CHANGE, distanceFactor }), 20);
  for (const [word, side] of SIDES) {
    const flip = found[side];
    if (!flip || (named && side === 'below')) continue;
    const distance = flip.value * detection.angularMpc;
    const by = flip.verdict === 'accompanied' ? neighbourAt(surroundings.pool, distance) : undefined;
    sentences.push(
      `Surroundings would be "${flip.verdict}"${by ? ` (${rowName(by.catalogue, by.index)})` : ''} instead of "${surroundings.verdict}" were it ${word} than ${distance.toFixed(1)} Mpc.`,
    );
  }
  return sentences;
}

/** What single change would flip the starlight verdict: depth or distance. */
function starlightFlips({ detection, starlight }: Assessment, starlightOf: (draw: Draw) => Starlight): string[] {
  const sentences: string[] = [];
  const would = (verdict: Starlight, cause: string) =>
    sentences.push(`Starlight would be "${verdict}" instead of "${starlight}" were ${cause}.`);
  const depth = flips(0, { low: -1, high: 1 }, (depthShiftMag) => starlightOf({ ...NO_CHANGE, depthShiftMag }), 20);
  if (depth.below) would(depth.below.verdict, `the depth ${(-depth.below.value).toFixed(2)} mag shallower than stated`);
  if (depth.above) would(depth.above.verdict, `the depth ${depth.above.value.toFixed(2)} mag deeper than stated`);
  const range = distanceRange(detection);
  if (!range) return sentences;
  const found = flips(1, range, (distanceFactor) => starlightOf({ ...NO_CHANGE, distanceFactor }), 20);
  for (const [word, side] of SIDES) {
    const flip = found[side];
    if (flip) would(flip.verdict, `it ${word} than ${(flip.value * detection.angularMpc).toFixed(1)} Mpc`);
  }
  return sentences;
}
