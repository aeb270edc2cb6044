import { formatDeclination, formatRightAscension } from '@eremite/shared/science/sky/sexagesimal-format';

/**
 * Right ascension as hours, minutes, seconds: `03ʰ12ᵐ04.1ˢ`.
 * @param deg degrees, any finite value (wrapped)
 * @param decimals decimals of the seconds of time
 * @throws {DomainError} for a value that is not finite
 */
export function rightAscension(deg: number, decimals = 1): string {
  const [hours, minutes, seconds] = formatRightAscension(deg, decimals).split(':');
  return `${hours}ʰ${minutes}ᵐ${seconds}ˢ`;
}

/**
 * Declination as degrees, minutes, seconds with a sign: `+14°07′22″`.
 * @param deg degrees, in [-90, 90]
 * @param decimals decimals of the seconds of arc
 * @throws {DomainError} for a value out of range
 */
export function declination(deg: number, decimals = 0): string {
  const [degrees, minutes, seconds] = formatDeclination(deg, decimals).replace('-', '−').split(':');
  return `${degrees}°${minutes}′${seconds}″`;
}
