import { ARCSECOND, DEGREE, SPEED_OF_LIGHT_KMS } from '@eremite/shared/science/constants';
import { isAbsurdRedshift } from '@eremite/shared/science/counterpart/velocity-term';
import { positionAngle } from '@eremite/shared/science/sky/position-angle';
import type { Detection } from './detection-table.ts';
import { isStar, type PreparedCatalogue } from './prepared-catalogue.ts';

/** A catalogue row inside the search radius of a detection. */
export interface CandidateRow {
  catalogue: PreparedCatalogue;
  /** Index into the catalogue's roles. */
  index: number;
  separationArcsec: number;
  positionAngleRad: number;
  eastArcsec: number;
  northArcsec: number;
  /** 1-D position error, arcsec. */
  sigmaArcsec: number;
  effectiveRadiusArcsec: number;
  /** As in the table; NaN where missing. */
  czKms: number;
  /** NaN where missing or absurd for a candidate of this detection. */
  usableCzKms: number;
  velocityDifferenceKms: number;
  /** Index of the first band with a magnitude that is no limit, in order of preference; -1 for none. */
  band: number;
  magnitude: number;
  isStar: boolean;
  override: 'accept' | 'reject' | null;
  /** Filled by weighing. */
  object: number;
  probability: number;
  chanceProbability: number;
  likelihoodRatio: number;
}

export type OverrideOf = (
  detection: Detection,
  catalogue: PreparedCatalogue,
  row: number,
) => 'accept' | 'reject' | null;

export function makeCandidate(
  detection: Detection,
  catalogue: PreparedCatalogue,
  index: number,
  separationArcsec: number,
  overrideOf: OverrideOf | null,
): CandidateRow {
  const pa = positionAngle(
    detection.raDeg * DEGREE,
    detection.decDeg * DEGREE,
    catalogue.raDeg[index]! * DEGREE,
    catalogue.decDeg[index]! * DEGREE,
  );
  const stated = catalogue.sigma ? catalogue.sigma[index]! : NaN;
  const czKms = catalogue.czKms ? catalogue.czKms[index]! : NaN;
  const redshift = czKms / SPEED_OF_LIGHT_KMS;
  const usable = isAbsurdRedshift(redshift, detection.redshift) ? NaN : czKms;
  let band = -1;
  for (let b = 0; b < catalogue.bands.length && band < 0; b++) {
    const { magnitude, isLimit } = catalogue.bands[b]!;
    if (magnitude[index]! === magnitude[index]! && !isLimit?.[index]) band = b;
  }
  return {
    catalogue,
    index,
    separationArcsec,
    positionAngleRad: pa,
    eastArcsec: separationArcsec * Math.sin(pa),
    northArcsec: separationArcsec * Math.cos(pa),
    sigmaArcsec: stated > 0 ? stated : catalogue.defaultSigma,
    effectiveRadiusArcsec: catalogue.effectiveRadius ? catalogue.effectiveRadius[index]! : NaN,
    czKms,
    usableCzKms: usable,
    velocityDifferenceKms: (czKms - detection.czKms) / (1 + detection.redshift),
    band,
    magnitude: band < 0 ? NaN : catalogue.bands[band]!.magnitude[index]!,
    isStar: isStar(catalogue, index),
    override: overrideOf ? overrideOf(detection, catalogue, catalogue.input.roles.columns.row[index]!) : null,
    object: -1,
    probability: 0,
    chanceProbability: NaN,
    likelihoodRatio: NaN,
  };
}

export const separationRad = (arcsec: number): number => arcsec * ARCSECOND;
