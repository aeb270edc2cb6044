import type { Doubt as ContractDoubt, Ground, VerdictDetail, VerdictItem } from '@eremite/shared/contracts/verdict';
import type { Hypotheses } from '@eremite/shared/science/counterpart/exclusive';
import type { VelocityModel } from '@eremite/shared/science/counterpart/velocity-term';
import type { Starlight } from '@eremite/shared/science/counterpart/starlight';
import type { CandidateRow } from './candidate-row.ts';
import type { Detection } from './detection-table.ts';
import type { BeamGalaxy } from './gas-and-light.ts';
import type { Silence } from './silence.ts';
import type { NeighbourRow, SurroundingsResult } from './surroundings.ts';
import type { ExpectationCache } from './expectation-cache.ts';
import type { WeighedObject } from './weighed-object.ts';

/** A bright star or a large galaxy that hides part of the search circle. */
export interface SkyMask {
  raDeg: number;
  decDeg: number;
  radiusArcsec: number;
  label: string;
  eastArcsec: number;
  northArcsec: number;
}

/** Faint objects about a detection that shows no galaxy. */
export interface Pieces {
  catalogue: string;
  radiusArcsec: number;
  count: number;
  /** By the ring about it. */
  expected: number;
  /** Chance of so many or more where nothing is there. */
  chance: number;
  band: string;
  /** Of all of them together. */
  magnitude: number;
}

/** A galaxy that another detection claims too. */
export interface Claim {
  object: WeighedObject;
  /** The other detection, and how far it is. */
  by: Detection;
  separationArcsec: number;
  /** Probability of the galaxy here if this detection were alone, here, and there, one galaxy to one detection. */
  alone: number;
  here: number;
  there: number;
}

/** Everything found out about one detection before it is put into words. */
export interface Assessment {
  detection: Detection;
  candidates: CandidateRow[];
  objects: WeighedObject[];
  expectations: ExpectationCache;
  silence: Silence;
  masks: SkyMask[];
  prior: number;
  priorSource: string;
  /** Reliability of the line used; NaN where none was given and 1 is taken. */
  reliability: number;
  probabilities: Hypotheses;
  /** How redshifts of unrelated objects are spread about this detection. */
  velocity: VelocityModel;
  starlight: Starlight;
  /** Most probable object, and the one that dominates, if any. */
  best: WeighedObject | null;
  dominating: WeighedObject | null;
  accepted: WeighedObject | null;
  /** Galaxies that other detections claim too. */
  claims: Claim[];
  /** Faint objects where a galaxy might lie in pieces; null where nobody looked, for no claim rests on it. */
  pieces: Pieces | null;
  inBeam: BeamGalaxy[];
  gasToLight: number;
  gasToLightIsLimit: boolean;
  surroundings: SurroundingsResult;
}

export type ScoredItem = Omit<VerdictItem, 'detectionId' | 'settled' | 'reviews' | 'overrides'>;
export type ScoredDetail = Omit<
  VerdictDetail,
  'runId' | 'runNumber' | 'criteriaNumber' | 'verdict' | 'candidates' | 'neighbours'
>;

/** One detection of a run, ready to be stored or written. */
export interface ScoredDetection {
  /** Place in the input order. */
  position: number;
  catalogueId: string;
  row: number;
  detection: Detection;
  item: ScoredItem;
  candidates: CandidateRow[];
  neighbours: NeighbourRow[];
  /** Made only when asked for. */
  detail(): ScoredDetail;
}

export type { ContractDoubt, Ground };
