import { DomainError } from '../domain-error.ts';

function joined(where: string, first: number, minutes: number, seconds: number, most: number): number {
  const fault = (name: string, value: number, below: number) =>
    new DomainError(`${where}: ${name} must lie in 0 to ${below}, found ${value}`);
  if (!(first >= 0 && first <= most)) throw fault('the first column', first, most);
  if (!(minutes >= 0 && minutes < 60)) throw fault('minutes', minutes, 60);
  if (!(seconds >= 0 && seconds <= 60)) throw fault('seconds', seconds, 60);
  const value = first + (minutes + seconds / 60) / 60;
  if (value > most) throw fault('the value', value, most);
  return value;
}

/**
 * Right ascension from the split columns RAh, RAm, RAs.
 *
 * @param hours 0..23
 * @param minutes 0..59, may be decimal where no seconds are given
 * @param seconds 0..60, 0 where there is no such column
 * @returns degrees in [0, 360)
 * @throws {DomainError} that names the part out of range
 */
export function joinRightAscension(hours: number, minutes: number, seconds = 0): number {
  return (joined('right ascension', hours, minutes, seconds, 24) * 15) % 360;
}

/**
 * Declination from the split columns DE-, DEd, DEm, DEs. The sign is a column of its own, so that -00 survives.
 *
 * @param sign `+`, `-`, blank, or a Unicode minus
 * @returns degrees in [-90, 90]
 * @throws {DomainError} that names the part out of range
 */
export function joinDeclination(sign: string, degrees: number, minutes: number, seconds = 0): number {
  const mark = sign.trim().replace('\u2212', '-');
  if (mark !== '' && mark !== '+' && mark !== '-') {
    throw new DomainError(`declination: the sign must be + or -, found "${sign}"`);
  }
  const value = joined('declination', degrees, minutes, seconds, 90);
  return mark === '-' ? -value : value;
}

/**
 * Whether a column of decimal right ascensions may hold hours: all of more than twenty values lie in 0 to 24.
 * The importer then asks; a field truly within 0 to 24 degrees is possible.
 *
 * @param values right ascensions as read; NaN marks a missing one and is passed over
 */
export function mayBeHours(values: ArrayLike<number>): boolean {
  let known = 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    if (Number.isNaN(value)) continue;
    if (value < 0 || value > 24) return false;
    known++;
  }
  return known > 20;
}
