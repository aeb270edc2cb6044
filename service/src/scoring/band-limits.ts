import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { BandLimit } from '@eremite/shared/contracts/verdict';
import { gasToLight } from '@eremite/shared/science/hydrogen/gas-to-light';
import { BANDS, type BandId } from '@eremite/shared/science/photometry/bands';
import { extendedLimit } from '@eremite/shared/science/photometry/extended-depth';
import { extinction } from '@eremite/shared/science/photometry/extinction';
import { physicalLimit } from '@eremite/shared/science/photometry/limits';
import { nuLuminosityOfAb, starFormationRate } from '@eremite/shared/science/photometry/star-formation';
import type { Detection } from './detection-table.ts';
import { LIMIT_RADIUS_ARCSEC } from './gas-and-light.ts';
import type { BandSilence } from './silence.ts';

const INFRARED_MASS_TO_LIGHT = [0.6];

/** What the silence of one band says in physical terms: limits for extended sources, never the point-source depth alone. */
export function bandLimit(detection: Detection, silence: BandSilence, criteria: CriteriaSettings): BandLimit {
  const { catalogue, band, expected, reason } = silence;
  const { absence } = criteria;
  const depth = band.depth5Sigma;
  const limitAt = (radius: number) =>
    extendedLimit({ limitMag: depth!, fwhmArcsec: band.seeing }, radius, absence.depthPenaltyMag);
  const dust =
    band.id && band.extinction !== 'already-corrected' && detection.ebvMag >= 0
      ? extinction(band.id, detection.ebvMag)
      : null;
  return {
    catalogueId: catalogue.input.id,
    catalogueName: catalogue.input.name,
    band: band.name,
    system: band.system,
    testable: silence.completeness !== null,
    reason,
    depthPoint: depth,
    depthExtended:
      depth === null
        ? []
        : absence.effectiveRadiiArcsec.map((radius) => ({ radiusArcsec: radius, magnitude: limitAt(radius) })),
    extinctionMag: dust,
    covered: silence.covered,
    unmasked: silence.unmasked,
    expectedMagnitude: expected ? expected.magnitude : null,
    expectedScatterMag: expected ? expected.scatterMag : null,
    completeness: silence.completeness,
    ...physical(detection, silence, depth === null ? null : limitAt(LIMIT_RADIUS_ARCSEC), dust ?? 0, criteria),
  };
}

type Physical = Pick<
  BandLimit,
  | 'absoluteMagnitudeLimit'
  | 'luminosityLimitSolar'
  | 'gasToLightLowerLimit'
  | 'stellarMassLimits'
  | 'starFormationLimit'
>;

function physical(
  detection: Detection,
  { band, covered }: BandSilence,
  limit: number | null,
  dust: number,
  { absence }: CriteriaSettings,
): Physical {
  const none: Physical = {
    absoluteMagnitudeLimit: null,
    luminosityLimitSolar: null,
    gasToLightLowerLimit: null,
    stellarMassLimits: [],
    starFormationLimit: null,
  };
  const { luminosityMpc } = detection;
  if (limit === null || !band.id || covered === 0 || !(luminosityMpc > 0)) return none;
  const facts = BANDS[band.id];
  const solar = band.system === 'AB' ? facts.solarAb : facts.solarVega;
  const ratios =
    facts.regime === 'infrared' ? INFRARED_MASS_TO_LIGHT : facts.regime === 'optical' ? absence.stellarMassToLight : [];
  const at = physicalLimit(limit, dust, luminosityMpc, solar, 1);
  const gas = 10 ** detection.logHiMass;
  return {
    absoluteMagnitudeLimit: at.absoluteMag,
    luminosityLimitSolar: at.luminositySolar,
    gasToLightLowerLimit: gas > 0 ? gasToLight(gas, at.luminositySolar, true).ratio : null,
    stellarMassLimits: ratios.map((massToLight) => ({
      massToLight,
      logMass: Math.log10(massToLight * at.luminositySolar),
    })),
    starFormationLimit: starFormation(band.id, limit + band.toAb, dust, luminosityMpc),
  };
}

function starFormation(id: BandId, limitAb: number, dust: number, luminosityMpc: number): number | null {
  if (id !== 'FUV' && id !== 'NUV') return null;
  return starFormationRate(nuLuminosityOfAb(limitAb, dust, BANDS[id].pivotMicron, luminosityMpc), id);
}
