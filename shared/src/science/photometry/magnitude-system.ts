import { DomainError } from '../domain-error.ts';
import { BANDS } from './bands.ts';
import type { BandId, MagnitudeSystem } from './bands.ts';

/**
 * Magnitude in the AB system.
 *
 * @param magnitude magnitude as the table gives it
 * @param band band of the magnitude
 * @param system system of the table: it must be known, for confusing the two is worth a factor 5 in mass at Ks
 * @returns AB magnitude; NaN (missing) stays NaN
 *
 * The offsets are synthetic (Willmer 2018); the WISE team's own differ by 0.02-0.05 mag.
 */
export function toAb(magnitude: number, band: BandId, system: MagnitudeSystem): number {
  return system === 'AB' ? magnitude : magnitude + BANDS[band].abMinusVega;
}

/** Magnitude in the Vega system; the inverse of `toAb`. */
export function toVega(magnitude: number, band: BandId, system: MagnitudeSystem): number {
  return system === 'Vega' ? magnitude : magnitude - BANDS[band].abMinusVega;
}

/** Absolute magnitude of the Sun in a band and a system, mag. Source: Willmer (2018), M = m + 31.5721. */
export function solarMagnitude(band: BandId, system: MagnitudeSystem): number {
  return system === 'AB' ? BANDS[band].solarAb : BANDS[band].solarVega;
}

/** Distance modulus of the Sun at 10 pc, 5 log10(10 pc / 1 au), which turns apparent into absolute solar magnitudes. */
export const SUN_TO_TEN_PARSEC_MAG = 5 * Math.log10((10 * 648000) / Math.PI);

/**
 * AB magnitude of a flux density.
 *
 * @param fluxMjy flux density, mJy, positive
 * @returns AB magnitude
 * @throws {DomainError} if the flux is not positive: a negative flux is a non-detection, not a magnitude
 *
 * Source: m_AB = -2.5 log10(f / 3631 Jy), Oke & Gunn (1983).
 */
export function abFromFlux(fluxMjy: number): number {
  if (!(fluxMjy > 0)) throw new DomainError(`abFromFlux: flux must be positive, got ${fluxMjy} mJy`);
  return -2.5 * Math.log10(fluxMjy / 3.631e6);
}
