import { DomainError } from '../domain-error.ts';

/**
 * Mean HI mass of HI-selected galaxies of a given stellar mass.
 *
 * @param logStellarMass log10 of the stellar mass in solar masses
 * @returns log10 of the HI mass in solar masses; scatter 0.3-0.4 dex
 * @throws {DomainError} if the input is not finite
 *
 * For comparison only: the verdict uses `stellarMassFromGas`. Source: Huang et al. (2012), ApJ 756, 113, from memory.
 */
export function meanHiMass(logStellarMass: number): number {
  if (!Number.isFinite(logStellarMass)) throw new DomainError(`meanHiMass: got ${logStellarMass}`);
  return logStellarMass <= 9 ? 0.712 * logStellarMass + 3.117 : 0.276 * logStellarMass + 7.042;
}

/**
 * Stellar mass at which the mean relation gives an HI mass: its inverse, not the mean stellar mass at that HI mass.
 *
 * @param logHiMass log10 of the HI mass in solar masses
 * @returns log10 of the stellar mass in solar masses
 * @throws {DomainError} if the input is not finite
 *
 * Source: Huang et al. (2012), from memory. The branches miss each other by 0.001 dex at log M* = 9; the change-over is put half-way.
 */
export function stellarMassOfMeanRelation(logHiMass: number): number {
  if (!Number.isFinite(logHiMass)) throw new DomainError(`stellarMassOfMeanRelation: got ${logHiMass}`);
  return logHiMass <= 9.5255 ? (logHiMass - 3.117) / 0.712 : (logHiMass - 7.042) / 0.276;
}

/** Straight line for the stars that go with gas, and its scatter in magnitudes. Refit it from a survey's own secure matches. */
export interface GasStarRelation {
  pivotLogHi: number;
  pivotLogStellar: number;
  slope: number;
  /** Stellar mass over r luminosity, solar units. */
  massToLightR: number;
  /** Counterparts are brighter than the line says, mag. */
  brighterMag: number;
  scatterAtPivotMag: number;
  scatterSlope: number;
  scatterMinMag: number;
  scatterMaxMag: number;
  /** Fraction of counterparts in the wide tail, and its width as a multiple of the core's (never under `tailMinMag`). */
  tailFraction: number;
  tailFactor: number;
  tailMinMag: number;
}

/**
 * Default relation: measured on a large published list of HI detections with counterparts assigned by experts
 * (single dish, 3.3 x 3.8 arcmin beam). Round numbers, starting points and no laws. The width of the tail is our choice.
 */
export const DEFAULT_GAS_STAR_RELATION: GasStarRelation = {
  pivotLogHi: 9.5,
  pivotLogStellar: 9,
  slope: 1.1,
  massToLightR: 0.75,
  brighterMag: 0.5,
  scatterAtPivotMag: 1.3,
  scatterSlope: -0.4,
  scatterMinMag: 0.7,
  scatterMaxMag: 2.5,
  tailFraction: 0.05,
  tailFactor: 2,
  tailMinMag: 3,
};

/**
 * Typical stellar mass of the counterpart of an HI detection.
 *
 * @param logHiMass log10 of the HI mass in solar masses
 * @param relation the line
 * @returns log10 of the stellar mass in solar masses
 * @throws {DomainError} if the input is not finite
 *
 * Method: expected.
 */
export function stellarMassFromGas(logHiMass: number, relation = DEFAULT_GAS_STAR_RELATION): number {
  if (!Number.isFinite(logHiMass)) throw new DomainError(`stellarMassFromGas: got ${logHiMass}`);
  return relation.pivotLogStellar + relation.slope * (logHiMass - relation.pivotLogHi);
}

/**
 * Scatter of the counterpart's magnitude about the line.
 *
 * @param logHiMass log10 of the HI mass in solar masses
 * @param relation the line
 * @returns 1-sigma of the core, mag
 */
export function relationScatterMag(logHiMass: number, relation = DEFAULT_GAS_STAR_RELATION): number {
  const free = relation.scatterAtPivotMag * Math.exp(relation.scatterSlope * (logHiMass - relation.pivotLogHi));
  return Math.min(relation.scatterMaxMag, Math.max(relation.scatterMinMag, free));
}

/**
 * How far a stellar-mass limit lies beyond the mean gas relation.
 *
 * @param logHiMass log10 of the HI mass in solar masses
 * @param logStellarLimit log10 of the stellar-mass limit in solar masses
 * @param scatterDex scatter of the relation, dex
 * @returns distance from the relation in its scatter; under 2 an ordinary gas-rich dwarf could hide below the limit
 * @throws {DomainError} if the scatter is not positive
 */
export function beyondRelation(logHiMass: number, logStellarLimit: number, scatterDex = 0.4): number {
  if (!(scatterDex > 0)) throw new DomainError(`beyondRelation: scatter must be positive, got ${scatterDex}`);
  return (stellarMassOfMeanRelation(logHiMass) - logStellarLimit) / scatterDex;
}
