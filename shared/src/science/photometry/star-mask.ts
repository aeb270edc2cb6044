import { DomainError } from '../domain-error.ts';

/** Stars fainter than this have no mask in the published relation, Gaia G. */
export const FAINTEST_MASKED_G = 13;

/**
 * Radius around a bright star inside which a catalogue's silence means nothing.
 *
 * @param gaiaG Gaia G magnitude of the star
 * @returns radius, arcsec; half of it is the inner core. Callers leave stars fainter than G = 13 unmasked.
 * @throws {DomainError} if the magnitude is not finite
 *
 * Source: Legacy Surveys mask relation, r = 1630 arcsec 1.396^-G.
 *
 * Method: absence.
 */
export function starMaskRadius(gaiaG: number): number {
  if (!Number.isFinite(gaiaG)) throw new DomainError(`starMaskRadius: G must be finite, got ${gaiaG}`);
  return 1630 * 1.396 ** -gaiaG;
}
