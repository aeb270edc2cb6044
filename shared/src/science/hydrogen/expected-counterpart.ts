import { DomainError } from '../domain-error.ts';
import { BANDS } from '../photometry/bands.ts';
import type { BandId } from '../photometry/bands.ts';
import { extinction } from '../photometry/extinction.ts';
import { sizePriorArcsec, sizePriorKpc } from '../photometry/size-prior.ts';
import type { SizePrior } from '../photometry/size-prior.ts';
import { DWARF_COLOURS } from './dwarf-colours.ts';
import type { DwarfColours } from './dwarf-colours.ts';
import { DEFAULT_GAS_STAR_RELATION, relationScatterMag, stellarMassFromGas } from './gas-relation.ts';
import type { GasStarRelation } from './gas-relation.ts';
import { hiMass } from './hi-mass.ts';

/** The ordinary counterpart an HI detection should have, as it would be observed. */
export interface ExpectedCounterpart {
  kind: 'expected';
  band: BandId;
  /** Apparent AB magnitude, dimmed by extinction. */
  magnitudeAb: number;
  /** 1-sigma of the core of the magnitude distribution, mag. */
  scatterMag: number;
  /** Share of counterparts in the wide tail, and its 1-sigma, mag. */
  tailFraction: number;
  tailScatterMag: number;
  logStellarMass: number;
  /** Half-light radii: physical where the distance is known, and on the sky. */
  radiusKpc: SizePrior;
  radiusArcsec: SizePrior;
  /** 'distance': from mass and distance; 'flux': distance unusable, from flux and a broad distance prior. */
  basis: 'distance' | 'flux';
}

/** No prediction is possible in this band: its silence counts for nothing. */
export interface NoExpectation {
  kind: 'not predicted';
  band: BandId;
  reason: string;
}

export interface ExpectationSettings {
  relation?: GasStarRelation;
  colours?: DwarfColours;
}

/**
 * Ordinary counterpart of an HI detection with a usable distance.
 *
 * @param logHiMass log10 of the HI mass in solar masses, without helium
 * @param luminosityMpc distance, Mpc, positive (used for angles too: they differ by 2 per cent at z = 0.01)
 * @param band band of the catalogue
 * @param ebvMag SFD98 E(B-V), mag
 * @param settings relation and colours; the defaults are stated where they are defined
 * @returns magnitude distribution and sizes, or why there is none
 * @throws {DomainError} if mass, distance or E(B-V) is out of range
 *
 * Source: direct fit of stars given gas (see DEFAULT_GAS_STAR_RELATION), turned to r with its mass-to-light ratio and
 * to other bands with the colours of gas-rich dwarfs.
 *
 * Method: expected.
 */
export function expectedCounterpart(
  logHiMass: number,
  luminosityMpc: number,
  band: BandId,
  ebvMag: number,
  settings: ExpectationSettings = {},
): ExpectedCounterpart | NoExpectation {
  if (!(luminosityMpc > 0)) {
    throw new DomainError(`expectedCounterpart: distance must be positive, got ${luminosityMpc} Mpc`);
  }
  const relation = settings.relation ?? DEFAULT_GAS_STAR_RELATION;
  const colour = (settings.colours ?? DWARF_COLOURS)[band];
  if (!colour) return { kind: 'not predicted', band, reason: `${band} light of a gas-rich dwarf cannot be predicted` };

  const logStellarMass = stellarMassFromGas(logHiMass, relation);
  const absoluteR = BANDS.r.solarAb - 2.5 * (logStellarMass - Math.log10(relation.massToLightR)) - relation.brighterMag;
  const scatterMag = Math.hypot(relationScatterMag(logHiMass, relation), colour.scatterMag);
  const radiusKpc = sizePriorKpc(logStellarMass);
  return {
    kind: 'expected',
    band,
    magnitudeAb: absoluteR + colour.minusR + 5 * Math.log10(luminosityMpc) + 25 + extinction(band, ebvMag),
    scatterMag,
    tailFraction: relation.tailFraction,
    tailScatterMag: Math.max(relation.tailMinMag, relation.tailFactor * scatterMag),
    logStellarMass,
    radiusKpc,
    radiusArcsec: sizePriorArcsec(radiusKpc, luminosityMpc),
    basis: 'distance',
  };
}

/** Where a distance is unusable the source is near: log-uniform between these, Mpc. Our choice. */
const NEAR_MPC = { from: 0.5, to: 10 };

/**
 * Ordinary counterpart of an HI detection whose distance is not usable.
 *
 * @param fluxJyKms HI flux, Jy km/s, positive
 * @param band band of the catalogue
 * @param ebvMag SFD98 E(B-V), mag
 * @param settings as above
 * @returns the same, with a broad magnitude and size prior
 * @throws {DomainError} if the flux is not positive
 *
 * With M* ~ M_HI^1.1 the apparent magnitude that belongs to a flux moves by only 0.5 mag per factor ten in distance, so
 * a flux does fix it roughly. What is unknown is scatter (the clip of the relation, at least 1.5 mag) and angular size.
 */
export function expectedCounterpartFromFlux(
  fluxJyKms: number,
  band: BandId,
  ebvMag: number,
  settings: ExpectationSettings = {},
): ExpectedCounterpart | NoExpectation {
  const middleMpc = Math.sqrt(NEAR_MPC.from * NEAR_MPC.to);
  const distanceDex = Math.log10(NEAR_MPC.to / NEAR_MPC.from) / Math.sqrt(12);
  const logHiMass = Math.log10(hiMass(fluxJyKms, middleMpc));
  const typical = expectedCounterpart(logHiMass, middleMpc, band, ebvMag, settings);
  if (typical.kind === 'not predicted') return typical;

  const slope = (settings.relation ?? DEFAULT_GAS_STAR_RELATION).slope;
  const distanceMag = Math.abs(5 - 5 * slope) * distanceDex;
  const scatterMag = Math.max(1.5, Math.hypot(typical.scatterMag, distanceMag));
  return {
    ...typical,
    scatterMag,
    tailScatterMag: Math.max(typical.tailScatterMag, scatterMag),
    radiusArcsec: sizePriorArcsec(typical.radiusKpc, middleMpc, distanceDex),
    basis: 'flux',
  };
}
