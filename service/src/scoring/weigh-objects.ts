import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { chanceProbability } from '@eremite/shared/science/counterpart/chance';
import {
  backgroundDensity,
  brighterDensity,
  counterpartDensity,
} from '@eremite/shared/science/counterpart/magnitude-term';
import { mergeIntoObjects } from '@eremite/shared/science/counterpart/merge-objects';
import { offsetDensity } from '@eremite/shared/science/counterpart/offset-density';
import { velocityFactor, type VelocityModel, velocityScatter } from '@eremite/shared/science/counterpart/velocity-term';
import type { GasStarRelation } from '@eremite/shared/science/hydrogen/gas-relation';
import {
  type DetectionSettings,
  detectionProbability,
  expectedDetection,
} from '@eremite/shared/science/photometry/completeness';
import type { CandidateRow } from './candidate-row.ts';
import type { CoveredShares } from './covered-share.ts';
import type { Detection } from './detection-table.ts';
import type { BandExpectation } from './expectation.ts';
import type { ExpectationCache } from './expectation-cache.ts';
import type { WeighedObject } from './weighed-object.ts';
import type { PreparedBand, PreparedCatalogue } from './prepared-catalogue.ts';
import { detectionSettings } from './detection-settings.ts';
import { unseenElsewhere } from './unseen-elsewhere.ts';

/** What is fixed for a run once everything that is learnt has been learnt. */
export interface WeighingModel {
  criteria: CriteriaSettings;
  relation: GasStarRelation;
  velocity: VelocityModel;
}

/** Velocity errors where tables give none, km/s. Common practice. */
const HI_ERROR_KMS = 5;
const OPTICAL_ERROR_KMS = 30;
/** Share of HI-selected galaxies that continuum tables of ordinary depth show; from memory, our choice. */
const CONTINUUM_SHARE = 0.05;
/** Stars of the Galaxy are slower than about this, km/s: the escape speed here. Common practice. */
const FASTEST_STAR_KMS = 600;

/** Scatter of gas and star velocities of a detection, km/s. */
export function velocityScatterOf({ width50Kms }: Detection, criteria: CriteriaSettings): number {
  const rotation = width50Kms > 0 ? width50Kms / 4 : 0;
  return velocityScatter(
    HI_ERROR_KMS,
    OPTICAL_ERROR_KMS,
    Math.max(criteria.counterpart.intrinsicVelocityKms, rotation),
  );
}

/** Groups candidate rows into objects, in the order in which they first appear. Sets `object` of each row. */
export function groupObjects(rows: readonly CandidateRow[]): WeighedObject[] {
  const numbers = mergeIntoObjects(
    rows.map((row) => ({
      eastArcsec: row.eastArcsec,
      northArcsec: row.northArcsec,
      sigmaArcsec: row.sigmaArcsec,
      effectiveRadiusArcsec: row.effectiveRadiusArcsec,
      catalogue: row.catalogue.index,
      density: row.catalogue.density,
      czKms: row.usableCzKms,
      isStar: row.isStar,
    })),
  );
  const members: CandidateRow[][] = [];
  rows.forEach((row, i) => {
    row.object = numbers[i]!;
    (members[row.object] ??= []).push(row);
  });
  return members.map(makeObject);
}

function makeObject(rows: CandidateRow[]): WeighedObject {
  let head = rows[0]!;
  for (const row of rows) if (row.sigmaArcsec < head.sigmaArcsec) head = row;
  const moving = rows.find((row) => !Number.isNaN(row.usableCzKms));
  return {
    rows,
    head,
    face: head,
    band: null,
    magnitude: NaN,
    czKms: moving ? moving.usableCzKms : NaN,
    velocityDifferenceKms: moving ? moving.velocityDifferenceKms : NaN,
    discordant: false,
    // A redshift no star of the Galaxy has outweighs a table's star/galaxy word.
    isStar: rows.some((row) => row.isStar) && !(Math.abs(moving?.usableCzKms ?? 0) > FASTEST_STAR_KMS),
    override: rows.some((row) => row.override === 'accept')
      ? 'accept'
      : rows.some((row) => row.override === 'reject')
        ? 'reject'
        : null,
    positionFactor: 0,
    magnitudeFactor: 1,
    velocityFactor: 1,
    weight: 0,
  };
}

/** Chooses the magnitude of an object: the band best liked, and in it the brightest piece with the flux of all pieces. */
function chooseMagnitude(object: WeighedObject, rank: (band: PreparedBand) => number): void {
  let best: CandidateRow | undefined;
  let bestRank = Infinity;
  for (const row of object.rows) {
    if (row.band < 0) continue;
    const place = rank(row.catalogue.bands[row.band]!);
    if (!best || place < bestRank || (place === bestRank && better(row, best))) {
      best = row;
      bestRank = place;
    }
  }
  if (!best) return;
  const band = best.catalogue.bands[best.band]!;
  let flux = 0;
  for (const row of object.rows) {
    if (row.catalogue === best.catalogue && row.band === best.band) flux += 10 ** (-0.4 * row.magnitude);
  }
  object.face = best;
  object.band = band;
  object.magnitude = -2.5 * Math.log10(flux);
}

const better = (row: CandidateRow, than: CandidateRow): boolean =>
  row.catalogue === than.catalogue ? row.magnitude < than.magnitude : false;

/**
 * Weighs the objects about a detection: X of each for prior one, position x magnitude x velocity, each entering once.
 */
export function weighObjects(
  detection: Detection,
  objects: readonly WeighedObject[],
  expectations: ExpectationCache,
  model: WeighingModel,
  catalogues: readonly PreparedCatalogue[],
  shares: CoveredShares,
): void {
  const { criteria } = model;
  const preference = criteria.counterpart.bandPreference;
  const rank = (band: PreparedBand) => {
    const place = preference.indexOf(band.name);
    return place < 0 ? 1000 : place;
  };
  const scatter = velocityScatterOf(detection, criteria);
  const settings = detectionSettings(criteria);
  for (const object of objects) {
    chooseMagnitude(object, rank);
    const { head, band, magnitude } = object;
    const f = offsetDensity(detection.covariance, head.sigmaArcsec, head.eastArcsec, head.northArcsec, detection.tail);
    object.positionFactor = f / object.face.catalogue.density;
    object.magnitudeFactor = magnitudeFactor(
      object.face.catalogue,
      band,
      magnitude,
      object.face.effectiveRadiusArcsec,
      expectations,
      settings,
    );
    object.discordant = Math.abs(object.velocityDifferenceKms) > criteria.counterpart.discordantKms;
    object.velocityFactor = Number.isNaN(object.velocityDifferenceKms)
      ? 1
      : velocityFactor(object.velocityDifferenceKms, scatter, model.velocity);
    const excluded = object.isStar || object.override === 'reject';
    if (excluded) continue;
    object.magnitudeFactor *= unseenElsewhere(detection, object, catalogues, rank, expectations, shares, criteria);
    object.weight = object.positionFactor * object.magnitudeFactor * object.velocityFactor;
  }
}

/** A row that is there was seen, however much fainter than the limit a typical galaxy of its brightness is. Our choice. */
const LEAST_SEEN = 0.35;

/**
 * w_m = q(m) p(m) / [n(m) / n], p(m) being the chance that a counterpart of this magnitude is in the table: with it the
 * weights of unrelated objects add, on average, to c and no more. 1 where the magnitude is unknown or the band's light
 * cannot be predicted.
 */
function magnitudeFactor(
  catalogue: PreparedCatalogue,
  band: PreparedBand | null,
  magnitude: number,
  effectiveRadius: number,
  expectations: ExpectationCache,
  settings: DetectionSettings,
): number {
  if (!band?.counts) return catalogue.input.kind === 'continuum' ? CONTINUUM_SHARE : 1;
  const expected = expectations.in(band);
  if (!expected) return 1;
  const seen = seenShare(band, magnitude, effectiveRadius, expected, settings);
  return (
    (seen * counterpartDensity(expected, magnitude) * catalogue.density) / backgroundDensity(band.counts, magnitude)
  );
}

function seenShare(
  band: PreparedBand,
  magnitude: number,
  effectiveRadius: number,
  { sizes }: BandExpectation,
  settings: DetectionSettings,
): number {
  if (band.depth5Sigma === null) return 1;
  const depth = { limitMag: band.depth5Sigma, fwhmArcsec: band.seeing };
  const exactly = { magnitudeAb: magnitude, scatterMag: 0, tailFraction: 0, tailScatterMag: 0 };
  const typical = expectedDetection(exactly, sizes, depth, settings);
  const own = effectiveRadius > 0 ? detectionProbability(magnitude, effectiveRadius, depth, settings) : 0;
  return Math.max(LEAST_SEEN, typical, own);
}

/** Chance probability and likelihood ratio of each row by itself, for those who want them. */
export function rateRows(
  detection: Detection,
  rows: readonly CandidateRow[],
  expectations: ExpectationCache,
  foundFraction: number,
  criteria: CriteriaSettings,
): void {
  const settings = detectionSettings(criteria);
  for (const row of rows) {
    const { catalogue } = row;
    const band = row.band < 0 ? null : catalogue.bands[row.band]!;
    const counts = band?.counts;
    const brighter = counts ? brighterDensity(counts, row.magnitude) : catalogue.density;
    row.chanceProbability = chanceProbability(
      row.separationArcsec,
      brighter,
      detection.searchArcsec,
      counts ? counts.total : catalogue.density,
    );
    const f = offsetDensity(detection.covariance, row.sigmaArcsec, row.eastArcsec, row.northArcsec, detection.tail);
    row.likelihoodRatio =
      (foundFraction *
        f *
        magnitudeFactor(catalogue, band, row.magnitude, row.effectiveRadiusArcsec, expectations, settings)) /
      catalogue.density;
  }
}
