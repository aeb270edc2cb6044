import { DEGREE, SPEED_OF_LIGHT_KMS } from '@eremite/shared/science/constants';
import {
  centroidError,
  covarianceOf,
  type Covariance,
  type ErrorEllipse,
  systematicError,
  widened,
} from '@eremite/shared/science/counterpart/position-error';
import {
  NO_TAIL,
  type OffsetTail,
  radiusHolding,
  shareInside,
  SINGLE_DISH_BEAM_ARCSEC,
} from '@eremite/shared/science/counterpart/search-radius';
import { chooseDistance, type Distance } from '@eremite/shared/science/distance/distance-rule';
import { hiDiameterArcmin } from '@eremite/shared/science/hydrogen/hi-size';
import { hiMass } from '@eremite/shared/science/hydrogen/hi-mass';
import { textAt } from '../tiles/column-pack.ts';
import { nameRole, numberRole, type NumberRole } from '../tiles/role-table.ts';
import type { EngineCatalogue, EngineInput } from './engine-input.ts';

/** One HI detection with all that follows from its own row. */
export interface Detection {
  /** Place in the input order. */
  position: number;
  /** Index of its catalogue in the input, and of the row in that catalogue's roles. */
  catalogue: number;
  index: number;
  /** Row number in the file. */
  row: number;
  name: string;
  raDeg: number;
  decDeg: number;
  /** NaN where missing, as all numbers below. */
  czKms: number;
  redshift: number;
  width50Kms: number;
  fluxJyKms: number;
  signalToNoise: number;
  reliability: number;
  ebvMag: number;
  /** Table whose rows about the place gave the reddening; empty where it is the detection's own or missing. */
  ebvSource: string;
  continuumMjy: number;
  beam: { major: number; minor: number; angleDeg: number } | null;
  /** 1-D errors of the HI position with its systematic part. */
  error: ErrorEllipse;
  errorSource: string;
  covariance: Covariance;
  tail: OffsetTail;
  searchArcsec: number;
  searchSource: string;
  /** Share of true offsets inside the search. */
  insideShare: number;
  distance: Distance;
  /** Who gave the distance, where a person replaced it. */
  distanceSource: string;
  angularMpc: number;
  luminosityMpc: number;
  distanceErrorMpc: number;
  /** log10 of the HI mass in solar masses; NaN where flux or distance is missing. */
  logHiMass: number;
}

/** Distances that people put in place of a table's, by table and row. */
export type ReplacedDistances = ReadonlyMap<string, EngineInput['decisions']['distances'][number]>;

export function replacedDistances({ decisions }: EngineInput): ReplacedDistances {
  return new Map(decisions.distances.map((d) => [`${d.catalogueId}/${d.row}`, d]));
}

/**
 * Reads one row of an HI table.
 *
 * @param c index of the table in the input
 * @param index of the row in the table's roles
 * @param position place in the input order
 */
export function readDetection(
  input: EngineInput,
  catalogue: EngineCatalogue,
  c: number,
  index: number,
  position: number,
  replaced: ReplacedDistances,
): Detection {
  const { roles } = catalogue;
  const value = (role: NumberRole): number => numberRole(roles, role)?.[index] ?? NaN;
  const positive = (role: NumberRole): number => {
    const number = value(role);
    return number > 0 ? number : NaN;
  };
  const names = nameRole(roles);
  const row = roles.columns.row[index]!;
  const czKms = value('czKms');
  const raDeg = roles.columns.raDeg[index]!;
  const decDeg = roles.columns.decDeg[index]!;
  const override = replaced.get(`${catalogue.id}/${row}`);
  const measured = override ? override.distanceMpc : positive('distanceMpc');
  const distance = chooseDistance(
    {
      czKms,
      raRad: (((raDeg % 360) + 360) % 360) * DEGREE,
      decRad: decDeg * DEGREE,
      ...(measured > 0
        ? {
            measuredMpc: measured,
            measuredErrorMpc: override ? (override.errorMpc ?? NaN) : positive('distanceErrorMpc'),
            ...(catalogue.distanceKind === 'luminosity' ? { measuredKind: 'luminosity' as const } : {}),
          }
        : {}),
    },
    input.criteria.distance,
    input.survey,
  );
  const redshift = Number.isFinite(czKms) ? czKms / SPEED_OF_LIGHT_KMS : 0;
  const fluxJyKms = positive('fluxJyKms');
  const known = distance.kind !== 'none';
  const logHiMass =
    known && fluxJyKms > 0 ? Math.log10(hiMass(fluxJyKms, distance.luminosityMpc, Math.max(redshift, -0.5))) : NaN;
  const detection: Detection = {
    position,
    catalogue: c,
    index,
    row,
    name: (names && textAt(names, index)) || String(row),
    raDeg,
    decDeg,
    czKms,
    redshift,
    width50Kms: positive('width50Kms'),
    fluxJyKms,
    signalToNoise: positive('signalToNoise'),
    reliability: value('reliability'),
    ebvMag: value('ebvMag'),
    ebvSource: '',
    continuumMjy: value('continuumMjy'),
    beam: catalogue.beamArcsec,
    ...placeError(input, catalogue, positive('positionErrorArcsec'), positive('signalToNoise'), logHiMass, distance),
    distance,
    distanceSource: override ? override.source : '',
    angularMpc: known ? distance.angularMpc : NaN,
    luminosityMpc: known ? distance.luminosityMpc : NaN,
    distanceErrorMpc: known ? distance.errorMpc : NaN,
    logHiMass,
  };
  return detection;
}

type PlaceError = Pick<
  Detection,
  'error' | 'errorSource' | 'covariance' | 'tail' | 'searchArcsec' | 'searchSource' | 'insideShare'
>;

const arcsec = (x: number): string => `${x >= 10 ? x.toFixed(0) : x.toFixed(1)} arcsec`;

function placeError(
  { criteria }: EngineInput,
  catalogue: EngineCatalogue,
  stated: number,
  signalToNoise: number,
  logHiMass: number,
  distance: Distance,
): PlaceError {
  const rules = criteria.position;
  const beam = catalogue.beamArcsec;
  const [statistical, errorSource] = statisticalError(catalogue, stated, signalToNoise, rules);
  let error = statistical;
  if (!(stated > 0) && catalogue.positionErrorArcsec === null && beam) {
    error = widened(error, rules.systematicArcsec ?? systematicError(beam.major));
  } else if (rules.systematicArcsec !== null) error = widened(error, rules.systematicArcsec);
  // Gas and stars of a resolved source need not share a centre.
  if (beam && distance.kind !== 'none' && logHiMass > 0) {
    const diameter = 60 * hiDiameterArcmin(logHiMass, distance.angularMpc);
    if (diameter > beam.major) error = widened(error, 0.05 * diameter);
  }
  const singleDish = beam !== null && beam.major > SINGLE_DISH_BEAM_ARCSEC;
  const tail: OffsetTail = singleDish ? { fraction: rules.tailFraction, widthArcsec: rules.tailArcsec } : NO_TAIL;
  const whole = widened(error, rules.opticalErrorArcsec);
  let searchArcsec = rules.searchRadiusArcsec ?? radiusHolding(rules.searchProbability, whole, tail);
  let searchSource =
    rules.searchRadiusArcsec !== null
      ? 'fixed by the criteria'
      : `holds ${100 * rules.searchProbability} per cent of true offsets`;
  if (rules.searchRadiusArcsec === null && rules.halfBeamFloor && singleDish && searchArcsec < beam.major / 2) {
    searchArcsec = beam.major / 2;
    searchSource = 'half a beam';
  }
  return {
    error,
    errorSource,
    covariance: covarianceOf(error),
    tail,
    searchArcsec,
    searchSource,
    insideShare: shareInside(searchArcsec, whole, tail),
  };
}

function statisticalError(
  catalogue: EngineCatalogue,
  stated: number,
  signalToNoise: number,
  rules: EngineInput['criteria']['position'],
): [ErrorEllipse, string] {
  const circle = (sigma: number): ErrorEllipse => ({ majorArcsec: sigma, minorArcsec: sigma, angleRad: 0 });
  const beam = catalogue.beamArcsec;
  if (stated > 0) return [circle(stated), `stated in the table (${arcsec(stated)})`];
  if (catalogue.positionErrorArcsec !== null) {
    return [circle(catalogue.positionErrorArcsec), `stated for the table (${arcsec(catalogue.positionErrorArcsec)})`];
  }
  if (beam && signalToNoise > 0) {
    return [
      {
        majorArcsec: centroidError(beam.major, signalToNoise, rules.centroidFactor),
        minorArcsec: centroidError(beam.minor, signalToNoise, rules.centroidFactor),
        angleRad: beam.angleDeg * DEGREE,
      },
      `from the beam (${arcsec(beam.major)}) and S/N ${signalToNoise.toFixed(1)}`,
    ];
  }
  const sigma = beam ? Math.max(rules.defaultErrorArcsec, beam.major / 10) : rules.defaultErrorArcsec;
  const missing = beam ? 'no signal-to-noise ratio is given' : 'neither a position error nor a beam is given';
  return [circle(sigma), `assumed to be ${arcsec(sigma)}: ${missing}`];
}
