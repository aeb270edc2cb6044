import { DomainError } from '../domain-error.ts';
import { BANDS } from './bands.ts';
import type { BandId } from './bands.ts';

/** Extinction law in the near ultraviolet: Bianchi et al. (2017), or Wyder et al. (2007), A = 8.24 E - 0.67 E^2 (from memory). */
export type UltravioletLaw = 'bianchi2017' | 'wyder2007';

/**
 * Galactic extinction in a band.
 *
 * @param band photometric band
 * @param ebvMag E(B-V) of the original SFD98 map, mag, not negative; a column already scaled by 0.86 must be undone first
 * @param ultraviolet law for FUV and NUV
 * @returns A_b, mag, to be subtracted once from the observed magnitude
 * @throws {DomainError} if E(B-V) is negative or not finite
 *
 * Fractional error 16 per cent. Above E(B-V) = 0.3 the optical and the ultraviolet are not tested by a catalogue.
 * Source: Schlafly & Finkbeiner (2011), R_V = 3.1.
 *
 * Method: extinction.
 */
export function extinction(band: BandId, ebvMag: number, ultraviolet: UltravioletLaw = 'bianchi2017'): number {
  if (!(ebvMag >= 0 && Number.isFinite(ebvMag))) {
    throw new DomainError(`extinction: E(B-V) must be a number >= 0, got ${ebvMag} mag`);
  }
  if (ultraviolet === 'wyder2007' && band === 'FUV') return 8.24 * ebvMag;
  if (ultraviolet === 'wyder2007' && band === 'NUV') return Math.max(0, 8.24 * ebvMag - 0.67 * ebvMag ** 2);
  return BANDS[band].extinctionCoefficient * ebvMag;
}
