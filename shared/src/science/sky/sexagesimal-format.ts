import { DomainError } from '../domain-error.ts';

function toFields(units: number, digits: number): { first: number; text: string } {
  // All rounding happens once, on the smallest unit, so that 59.9996 carries instead of becoming 60.
  const scale = 10 ** digits;
  const ticks = Math.round(units * 3600 * scale);
  const seconds = ticks % (60 * scale);
  const minutes = Math.floor(ticks / (60 * scale));
  const whole = Math.floor(seconds / scale)
    .toString()
    .padStart(2, '0');
  const fraction = digits > 0 ? `.${(seconds % scale).toString().padStart(digits, '0')}` : '';
  const first = Math.floor(minutes / 60);
  return { first, text: `${(minutes % 60).toString().padStart(2, '0')}:${whole}${fraction}` };
}

function assertDigits(where: string, deg: number, digits: number): void {
  if (!Number.isFinite(deg) || !Number.isInteger(digits) || digits < 0 || digits > 8) {
    throw new DomainError(`${where}: expected finite degrees and 0 to 8 digits, got ${deg} and ${digits}`);
  }
}

/**
 * Right ascension as `hh:mm:ss.ss`, rounded, and carried over midnight.
 *
 * @param deg right ascension, degrees, any finite value
 * @param digits decimals of the seconds of time, 0..8
 * @throws {DomainError} for arguments out of range
 */
export function formatRightAscension(deg: number, digits = 2): string {
  assertDigits('formatRightAscension', deg, digits);
  const { first, text } = toFields((((deg % 360) + 360) % 360) / 15, digits);
  return `${(first % 24).toString().padStart(2, '0')}:${text}`;
}

/**
 * Declination as `+dd:mm:ss.s`, rounded, always with its sign.
 *
 * @param deg declination, degrees, in [-90, 90]
 * @param digits decimals of the seconds of arc, 0..8
 * @throws {DomainError} for arguments out of range
 */
export function formatDeclination(deg: number, digits = 1): string {
  assertDigits('formatDeclination', deg, digits);
  if (Math.abs(deg) > 90) throw new DomainError(`formatDeclination: expected -90 to 90 degrees, got ${deg}`);
  const { first, text } = toFields(Math.abs(deg), digits);
  const sign = deg < 0 || Object.is(deg, -0) ? '-' : '+';
  return `${sign}${first.toString().padStart(2, '0')}:${text}`;
}
