import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { expectedFluxShares } from '@eremite/shared/science/counterpart/expected-flux';
import { meanHiMass } from '@eremite/shared/science/hydrogen/gas-relation';
import { gasToLightFromFlux } from '@eremite/shared/science/hydrogen/gas-to-light';
import { BANDS } from '@eremite/shared/science/photometry/bands';
import { extinction } from '@eremite/shared/science/photometry/extinction';
import { extendedLimit } from '@eremite/shared/science/photometry/extended-depth';
import type { Detection } from './detection-table.ts';
import type { PreparedBand } from './prepared-catalogue.ts';
import { asR } from './redshift-reach.ts';
import type { BandSilence } from './silence.ts';
import type { WeighedObject } from './weighed-object.ts';

/** r magnitude (AB), freed of extinction, of a magnitude in a band; NaN where it cannot be told. */
export function clearR(detection: Detection, band: PreparedBand | null, magnitude: number): number {
  if (!band?.id) return NaN;
  const dust =
    detection.ebvMag > 0 && band.extinction !== 'already-corrected' ? extinction(band.id, detection.ebvMag) : 0;
  return asR(magnitude - dust, band.id, band.toAb);
}

/** M_HI / L_r of an object as counterpart, solar; NaN without a flux or a magnitude. Free of distance. */
export function gasToLightOf(detection: Detection, object: WeighedObject): number {
  const r = clearR(detection, object.band, object.magnitude);
  if (!(detection.fluxJyKms > 0) || Number.isNaN(r)) return NaN;
  return gasToLightFromFlux(detection.fluxJyKms, r, BANDS.r.solarAb, false).ratio;
}

/** Size at which the limit on the light of a detection without stars is stated, arcsec. */
export const LIMIT_RADIUS_ARCSEC = 10;

/** Lower limit on M_HI / L_r from the best silent band; NaN where there is none. */
export function gasToLightLimit(detection: Detection, best: BandSilence | null, criteria: CriteriaSettings): number {
  if (!best || best.band.depth5Sigma === null || !best.covered || !(detection.fluxJyKms > 0)) return NaN;
  const depth = { limitMag: best.band.depth5Sigma, fwhmArcsec: best.band.seeing };
  const limit = extendedLimit(depth, LIMIT_RADIUS_ARCSEC, criteria.absence.depthPenaltyMag);
  const r = clearR(detection, best.band, limit);
  return Number.isNaN(r) ? NaN : gasToLightFromFlux(detection.fluxJyKms, r, BANDS.r.solarAb, true).ratio;
}

/** A galaxy inside the beam at the velocity of the gas, and its share of the flux to be expected. */
export interface BeamGalaxy {
  object: WeighedObject;
  share: number;
}

/** Half width of a line whose width is not given, and what velocity errors add, km/s. Our choice. */
const UNKNOWN_HALF_WIDTH_KMS = 100;
const MARGIN_KMS = 50;
/** Shares hardly depend on the distance: this one serves where there is none, Mpc. */
const ANY_DISTANCE_MPC = 30;

/**
 * Galaxies inside the half-power beam whose velocities lie within the line, with the expected share of the flux of each.
 * None where the beam or the velocity is unknown.
 */
export function galaxiesInBeam(
  detection: Detection,
  objects: readonly WeighedObject[],
  criteria: CriteriaSettings,
): BeamGalaxy[] {
  const { beam, width50Kms } = detection;
  if (!beam || !Number.isFinite(detection.czKms)) return [];
  const half = (width50Kms > 0 ? width50Kms / 2 : UNKNOWN_HALF_WIDTH_KMS) + MARGIN_KMS;
  const angle = (beam.angleDeg * Math.PI) / 180;
  const distance = detection.luminosityMpc > 0 ? detection.luminosityMpc : ANY_DISTANCE_MPC;
  const members = objects.flatMap((object) => {
    if (object.isStar || object.override === 'reject' || !(Math.abs(object.velocityDifferenceKms) <= half)) return [];
    const { eastArcsec: e, northArcsec: n } = object.head;
    const along = e * Math.sin(angle) + n * Math.cos(angle);
    const across = e * Math.cos(angle) - n * Math.sin(angle);
    const beamOffset = Math.hypot(along / beam.major, across / beam.minor);
    if (beamOffset > 0.5) return [];
    const r = clearR(detection, object.band, object.magnitude);
    const absolute = r - 5 * Math.log10(distance) - 25;
    const logStellar = Math.log10(criteria.counterpart.massToLightR) + (BANDS.r.solarAb - absolute) / 2.5;
    return [{ object, beamOffset, logHiMass: Number.isNaN(r) ? NaN : meanHiMass(logStellar) }];
  });
  const shares = expectedFluxShares(members);
  return members
    .map(({ object }, i) => ({ object, share: shares[i]! }))
    .filter(({ share }) => share >= criteria.counterpart.confusedFluxShare)
    .sort((a, b) => b.share - a.share);
}
