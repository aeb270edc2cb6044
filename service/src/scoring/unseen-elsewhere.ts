import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { DWARF_COLOURS } from '@eremite/shared/science/hydrogen/dwarf-colours';
import {
  type DetectionSettings,
  detectionProbability,
  expectedDetection,
} from '@eremite/shared/science/photometry/completeness';
import type { CoveredShares } from './covered-share.ts';
import type { Detection } from './detection-table.ts';
import type { PreparedBand, PreparedCatalogue } from './prepared-catalogue.ts';
import { detectionSettings } from './detection-settings.ts';
import type { ExpectationCache } from './expectation-cache.ts';
import type { WeighedObject } from './weighed-object.ts';

/** Share of galaxies whose rows in two tables are not recognised as one object. Our choice. */
const UNRECOGNISED = 0.02;
/** Size taken for an object that states none, arcsec. Our choice. */
const USUAL_RADIUS_ARCSEC = 3;
/** Spread of a galaxy's colour about the mean, mag, besides that of the bands. Our choice. */
const COLOUR_SPREAD_MAG = 0.4;

/**
 * Chance that a true counterpart seen as this object would be absent from the tables whose bands come before its own.
 *
 * The magnitude of an object comes from the first band of the preference that it has, so the ways of finding a counterpart
 * are: in the first band; not there but in the second; and so on. Without this factor an unrelated object of each further
 * table would count as one more way, and a detection without stars would gain a counterpart from every table added.
 */
export function unseenElsewhere(
  detection: Detection,
  object: WeighedObject,
  catalogues: readonly PreparedCatalogue[],
  rank: (band: PreparedBand) => number,
  expectations: ExpectationCache,
  shares: CoveredShares,
  criteria: CriteriaSettings,
): number {
  let unseen = 1;
  const own = object.band ? rank(object.band) : Infinity;
  const settings = detectionSettings(criteria);
  for (const catalogue of catalogues) {
    const band = catalogue.bands[0];
    if (!band || catalogue === object.face.catalogue || rank(band) >= own) continue;
    if (object.rows.some((row) => row.catalogue === catalogue)) continue;
    const covered = shares.of(detection, catalogue) ?? 1;
    unseen *= 1 - (1 - UNRECOGNISED) * covered * seenIn(object, band, expectations, settings);
  }
  return unseen;
}

function seenIn(
  object: WeighedObject,
  band: PreparedBand,
  expectations: ExpectationCache,
  settings: DetectionSettings,
): number {
  // A table that states no depth is judged here by its own faint end; its silence still gives no power.
  const limitMag = band.depth5Sigma ?? band.counts?.faintEnd;
  if (limitMag === undefined) return 0;
  const depth = { limitMag, fwhmArcsec: band.seeing };
  const to = band.id && DWARF_COLOURS[band.id];
  const from = object.band?.id && DWARF_COLOURS[object.band.id];
  if (!to || !from) {
    const expected = expectations.in(band);
    return expected
      ? expectedDetection({ ...expected, magnitudeAb: expected.magnitude }, expected.sizes, depth, settings)
      : 0;
  }
  const magnitude = object.magnitude + object.band!.toAb - from.minusR + to.minusR - band.toAb;
  const radius = object.head.effectiveRadiusArcsec > 0 ? object.head.effectiveRadiusArcsec : USUAL_RADIUS_ARCSEC;
  const rollOffMag = Math.hypot(settings.rollOffMag, COLOUR_SPREAD_MAG, to.scatterMag, from.scatterMag);
  return detectionProbability(magnitude, radius, depth, { ...settings, rollOffMag });
}
