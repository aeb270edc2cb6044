import { z } from 'zod';
import { surroundingsMeasures } from './surroundings-measures.ts';
import { DOUBT_GRADES, STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS } from './words.ts';

const starlight = z.enum(STARLIGHT_VERDICTS);
const surroundings = z.enum(SURROUNDINGS_VERDICTS);
const probability = z.number().min(0).max(1);

export const doubt = z.object({
  name: z.string(),
  grade: z.enum(DOUBT_GRADES),
  value: z.number().nullable(),
  unit: z.string(),
  /** The plain sentence with its numbers. */
  sentence: z.string(),
  rule: z.string(),
  source: z.string(),
});
export type Doubt = z.output<typeof doubt>;

/** Why a verdict is what it is: a sentence, and whether it speaks for or against the verdict. */
export const ground = z.object({
  about: z.enum(['starlight', 'surroundings', 'distance', 'data']),
  weight: z.enum(['for', 'against', 'note']),
  text: z.string(),
  /** Entry of the methods page behind the number, if any. */
  method: z.string().nullable(),
});
export type Ground = z.output<typeof ground>;

export const distanceUsed = z.object({
  kind: z.enum(['measured', 'flow', 'hubble', 'none']),
  /** Luminosity distance, Mpc. */
  luminosityMpc: z.number().nullable(),
  /** Angular-diameter distance, Mpc; used for projection. */
  angularMpc: z.number().nullable(),
  errorMpc: z.number().nullable(),
  /** Why there is none, or where it came from. */
  note: z.string(),
  /** Every distance that the velocity may stand for, with the gas mass there. */
  branches: z
    .array(
      z.object({
        name: z.string(),
        velocityKms: z.number(),
        luminosityMpc: z.number().nullable(),
        logHiMass: z.number().nullable(),
        used: z.boolean(),
        note: z.string(),
      }),
    )
    .default([]),
});
export type DistanceUsed = z.output<typeof distanceUsed>;

/** One row inside the search radius, before merging and exclusion. */
export const candidate = z.object({
  catalogueId: z.string(),
  catalogueName: z.string(),
  kind: z.string(),
  rowId: z.int(),
  name: z.string(),
  raDeg: z.number(),
  decDeg: z.number(),
  separationArcsec: z.number(),
  positionAngleDeg: z.number(),
  separationKpc: z.number().nullable(),
  velocityKms: z.number().nullable(),
  /** cz difference / (1 + z of the detection), km/s. */
  velocityDifferenceKms: z.number().nullable(),
  band: z.string().nullable(),
  magnitude: z.number().nullable(),
  /** Probability that an unrelated object as bright lies this near. */
  chanceProbability: z.number().nullable(),
  likelihoodRatio: z.number().nullable(),
  /** Exclusive probability of the physical object this row belongs to. */
  probability,
  /** Rows with the same number are one physical object. */
  object: z.int(),
  isStar: z.boolean(),
  override: z.enum(['accept', 'reject']).nullable(),
});
export type Candidate = z.output<typeof candidate>;

export const neighbour = z.object({
  catalogueId: z.string(),
  catalogueName: z.string(),
  kind: z.string(),
  rowId: z.int(),
  name: z.string(),
  raDeg: z.number(),
  decDeg: z.number(),
  separationArcsec: z.number(),
  positionAngleDeg: z.number(),
  separationKpc: z.number(),
  velocityKms: z.number().nullable(),
  velocityDifferenceKms: z.number(),
  band: z.string().nullable(),
  magnitude: z.number().nullable(),
  absoluteMagnitude: z.number().nullable(),
  logHiMass: z.number().nullable(),
  /** Brighter than the criterion's faintest neighbour (or gas-rich enough): decides the verdict. */
  qualifies: z.boolean(),
});
export type Neighbour = z.output<typeof neighbour>;

/** What the silence of one band is worth at this place. */
export const bandLimit = z.object({
  catalogueId: z.string(),
  catalogueName: z.string(),
  band: z.string(),
  system: z.string(),
  /** supported, contradicted or not testable here, with why. */
  testable: z.boolean(),
  reason: z.string(),
  depthPoint: z.number().nullable(),
  /** Limits for extended sources: effective radius in arcsec and total magnitude. */
  depthExtended: z.array(z.object({ radiusArcsec: z.number(), magnitude: z.number() })),
  extinctionMag: z.number().nullable(),
  covered: probability.nullable(),
  unmasked: probability.nullable(),
  expectedMagnitude: z.number().nullable(),
  expectedScatterMag: z.number().nullable(),
  /** c: chance that the ordinary counterpart would have been seen in this band here. */
  completeness: probability.nullable(),
  absoluteMagnitudeLimit: z.number().nullable(),
  luminosityLimitSolar: z.number().nullable(),
  gasToLightLowerLimit: z.number().nullable(),
  stellarMassLimits: z.array(z.object({ massToLight: z.number(), logMass: z.number() })),
  starFormationLimit: z.number().nullable(),
});
export type BandLimit = z.output<typeof bandLimit>;

const nearest = z.object({
  catalogueId: z.string(),
  rowId: z.int(),
  name: z.string(),
  separationKpc: z.number(),
  velocityDifferenceKms: z.number(),
});

export const robustnessResult = z.object({
  draws: z.int(),
  seed: z.int(),
  /** Share of draws with the stated verdict, and its 95 per cent interval (Wilson). */
  starlightStability: probability.nullable(),
  starlightInterval: z.tuple([z.number(), z.number()]).nullable(),
  surroundingsStability: probability.nullable(),
  surroundingsInterval: z.tuple([z.number(), z.number()]).nullable(),
  /** Sentences such as "would be accompanied if nearer than 21 Mpc". */
  flips: z.array(z.string()),
});

/** One item a detection: what lists and exports carry. */
export const verdictItem = z.object({
  detectionId: z.string(),
  name: z.string(),
  raDeg: z.number(),
  decDeg: z.number(),
  velocityKms: z.number().nullable(),
  width50Kms: z.number().nullable(),
  fluxJyKms: z.number().nullable(),
  signalToNoise: z.number().nullable(),
  distanceMpc: z.number().nullable(),
  distanceErrorMpc: z.number().nullable(),
  logHiMass: z.number().nullable(),
  starlight,
  pNone: probability,
  pMissed: probability,
  pSpurious: probability,
  power: probability.nullable(),
  counterpart: z
    .object({ catalogueId: z.string(), rowId: z.int(), name: z.string(), probability, separationArcsec: z.number() })
    .nullable(),
  surroundings,
  /** P(no neighbour). */
  pAlone: probability.nullable(),
  nearest: nearest.nullable(),
  /** Catalogue rows with a velocity within 1 Mpc and 500 km/s, the detection and its counterpart left out. */
  count1Mpc500Kms: z.int().nullable(),
  gasToLight: z.number().nullable(),
  gasToLightIsLimit: z.boolean(),
  /** Doubts graded watch or serious. */
  doubts: z.array(z.object({ name: z.string(), grade: z.enum(DOUBT_GRADES) })),
  grounds: z.array(ground),
  /** The headline with its qualification: "no starlight found; debris likely". */
  headline: z.string(),
  robustness: robustnessResult.nullable(),
  /** The lead's word in force; `stands` is false where its evidence moved since. */
  settled: z
    .object({ starlight, surroundings, outcome: z.string(), by: z.string(), note: z.string(), stands: z.boolean() })
    .nullable(),
  reviews: z.int(),
  overrides: z.int(),
});
export type VerdictItem = z.output<typeof verdictItem>;

/** Everything behind one verdict. */
export const verdictDetail = z.object({
  runId: z.string(),
  runNumber: z.int(),
  criteriaNumber: z.int(),
  verdict: verdictItem,
  distance: distanceUsed,
  /** One-dimensional HI position error along its axes, arcsec, and how it was got. */
  positionError: z.object({
    majorArcsec: z.number(),
    minorArcsec: z.number(),
    angleDeg: z.number(),
    source: z.string(),
  }),
  beamArcsec: z.object({ major: z.number(), minor: z.number(), angleDeg: z.number() }).nullable(),
  searchRadiusArcsec: z.number(),
  neighbourRadiusArcsec: z.number().nullable(),
  candidates: z.array(candidate),
  neighbours: z.array(neighbour),
  limits: z.array(bandLimit),
  doubts: z.array(doubt),
  /** Measures of the surroundings beside the verdict; null without a usable distance. */
  measures: surroundingsMeasures.nullable().default(null),
  /** Galaxies that other detections claim too: probability of each if this detection were alone, here, and there. */
  claims: z
    .array(
      z.object({
        galaxy: z.string(),
        catalogueId: z.string(),
        rowId: z.int(),
        detection: z.string(),
        separationArcsec: z.number(),
        alone: probability,
        here: probability,
        there: probability,
      }),
    )
    .default([]),
  /** P(no neighbour) in its three factors. */
  aloneFactors: z.object({ noneKnown: probability, noneUnseen: probability, covered: probability }).nullable(),
  /** P(none) at other priors. */
  priors: z.array(z.object({ prior: z.number(), pNone: probability, pMissed: probability })),
  masks: z.array(z.object({ raDeg: z.number(), decDeg: z.number(), radiusArcsec: z.number(), label: z.string() })),
});
export type VerdictDetail = z.output<typeof verdictDetail>;
