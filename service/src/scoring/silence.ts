import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { DEGREE } from '@eremite/shared/science/constants';
import { effectiveCompleteness } from '@eremite/shared/science/counterpart/exclusive';
import { BANDS } from '@eremite/shared/science/photometry/bands';
import { type DetectionSettings, expectedDetection } from '@eremite/shared/science/photometry/completeness';
import { type MaskCircle, maskedProbability } from '@eremite/shared/science/photometry/mask-overlap';
import { toGalactic } from '@eremite/shared/science/sky/galactic';
import { detectionSettings } from './detection-settings.ts';
import type { CoveredShares } from './covered-share.ts';
import type { Detection } from './detection-table.ts';
import type { BandExpectation } from './expectation.ts';
import type { PreparedBand, PreparedCatalogue } from './prepared-catalogue.ts';
import type { ExpectationCache } from './expectation-cache.ts';

/** What the silence of one band is worth about one detection. */
export interface BandSilence {
  catalogue: PreparedCatalogue;
  band: PreparedBand;
  expected: BandExpectation | undefined;
  /** Covered share of the search circle; null where unknown. */
  covered: number | null;
  unmasked: number;
  /** Chance that the ordinary counterpart is in the table if it is covered; null where it cannot be told. */
  detected: number | null;
  /** c of this band; null where not testable. */
  completeness: number | null;
  /** Why it cannot be tested, or what limits it. */
  reason: string;
}

export interface Silence {
  bands: BandSilence[];
  /** Band with the largest c; null where none can be tested. */
  best: BandSilence | null;
  /** c of the best band. */
  power: number | null;
}

/** What hides a band here whatever its depth; undefined if nothing does. */
function hiddenBecause(detection: Detection, band: PreparedBand, criteria: CriteriaSettings): string | undefined {
  if (!band.id || BANDS[band.id].regime === 'infrared') return undefined;
  const { maximumReddeningMag, minimumLatitudeDeg } = criteria.absence;
  if (detection.ebvMag > maximumReddeningMag) {
    return `E(B-V) is ${detection.ebvMag.toFixed(2)} mag, over ${maximumReddeningMag}: dust hides the ${band.name} band`;
  }
  if (Number.isNaN(detection.ebvMag)) {
    const latitude = latitudeDeg(detection);
    if (latitude < minimumLatitudeDeg) {
      return `${latitude.toFixed(1)} degrees from the Galactic plane with no reddening known: the ${band.name} band cannot be tested`;
    }
  }
  return undefined;
}

export function latitudeDeg({ raDeg, decDeg }: Pick<Detection, 'raDeg' | 'decDeg'>): number {
  return Math.abs(toGalactic((((raDeg % 360) + 360) % 360) * DEGREE, decDeg * DEGREE).lat) / DEGREE;
}

/**
 * What the silence of every band is worth: c = share of offsets inside the search x covered x unmasked x detected.
 *
 * @param masks bright stars near the detection
 */
export function weighSilence(
  detection: Detection,
  catalogues: readonly PreparedCatalogue[],
  masks: readonly MaskCircle[],
  expectations: ExpectationCache,
  criteria: CriteriaSettings,
  shares: CoveredShares,
): Silence {
  const settings = detectionSettings(criteria);
  const masked =
    masks.length > 0
      ? maskedProbability(
          Math.hypot(detection.error.majorArcsec, detection.error.minorArcsec) / Math.SQRT2,
          detection.searchArcsec,
          masks,
        )
      : 0;
  const bands: BandSilence[] = [];
  let best: BandSilence | null = null;
  for (const catalogue of catalogues) {
    if (catalogue.input.kind === 'continuum') continue;
    const covered = shares.of(detection, catalogue);
    for (const band of catalogue.bands) {
      const silence = bandSilence(detection, catalogue, band, covered, 1 - masked, expectations, criteria, settings);
      bands.push(silence);
      if (silence.completeness !== null && !(best && best.completeness! >= silence.completeness)) best = silence;
    }
  }
  return { bands, best, power: best ? best.completeness : null };
}

function bandSilence(
  detection: Detection,
  catalogue: PreparedCatalogue,
  band: PreparedBand,
  covered: number | null,
  unmasked: number,
  expectations: ExpectationCache,
  criteria: CriteriaSettings,
  settings: DetectionSettings,
): BandSilence {
  const expected = expectations.in(band);
  const base = { catalogue, band, expected, covered, unmasked, detected: null, completeness: null };
  const hidden = hiddenBecause(detection, band, criteria);
  if (covered === 0) {
    return { ...base, detected: 0, completeness: 0, reason: `${catalogue.input.name} does not cover this place` };
  }
  if (hidden) return { ...base, reason: hidden };
  if (!expected) return { ...base, reason: `the ${band.name} light of a gas-rich galaxy cannot be predicted` };
  if (band.depth5Sigma === null) {
    return {
      ...base,
      reason: `${catalogue.input.name} states no depth in ${band.name}: its silence counts for nothing`,
    };
  }
  const depth = { limitMag: band.depth5Sigma, fwhmArcsec: band.seeing };
  const detected = Math.min(
    1,
    expectedDetection({ ...expected, magnitudeAb: expected.magnitude }, expected.sizes, depth, settings),
  );
  if (covered === null) {
    return {
      ...base,
      detected,
      reason: `what ${catalogue.input.name} covers is not known: an empty place may be an unobserved one`,
    };
  }
  return {
    ...base,
    detected,
    completeness: effectiveCompleteness(detection.insideShare, covered, unmasked, detected),
    reason: '',
  };
}
