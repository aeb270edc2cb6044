import { DomainError } from '../domain-error.ts';

/** How fine a designation is: `Jhhmm+ddmm`, `Jhhmmss+ddmmss`, or `Jhhmmss.s+ddmmss`. */
export type DesignationStyle = 'minutes' | 'seconds' | 'tenths';

/** Ticks of right ascension in a second of time, kept by each style; declination is cut to whole units. */
const RA_TICKS: Readonly<Record<DesignationStyle, number>> = { minutes: 1 / 60, seconds: 1, tenths: 10 };

const pad = (n: number) => n.toString().padStart(2, '0');

/** Cut, not rounded, but a value that is a whole number but for float noise keeps its last unit. */
function cut(value: number): number {
  return Math.floor(Number(value.toFixed(6)));
}

/**
 * Designation of a source from its position, truncated as the IAU asks.
 *
 * @param raDeg right ascension (ICRS), degrees, [0, 360)
 * @param decDeg declination (ICRS), degrees
 * @param style how fine
 * @returns for example `J0139+4328`
 * @throws {DomainError} for a position out of range
 *
 * A designation is a label, never a position: at declination +43° `Jhhmm+ddmm` stands for a cell of 10.9′ by 1′.
 * Before truncation the value is rounded to a millionth of the last unit, or float noise would drop one.
 * Source: IAU Specifications for Nomenclature (Dickel et al.).
 */
export function designation(raDeg: number, decDeg: number, style: DesignationStyle = 'minutes'): string {
  if (!(raDeg >= 0 && raDeg < 360) || !(Math.abs(decDeg) <= 90)) {
    throw new DomainError(`designation: expected RA in [0, 360) and Dec in [-90, 90] degrees, got ${raDeg}, ${decDeg}`);
  }
  const perSecond = RA_TICKS[style];
  const day = 86_400 * perSecond;
  const ra = cut(raDeg * 240 * perSecond) % Math.round(day);
  const sign = decDeg < 0 || Object.is(decDeg, -0) ? '-' : '+';
  if (style === 'minutes') {
    const dec = cut(Math.abs(decDeg) * 60);
    return `J${pad(Math.floor(ra / 60))}${pad(ra % 60)}${sign}${pad(Math.floor(dec / 60))}${pad(dec % 60)}`;
  }
  const dec = cut(Math.abs(decDeg) * 3600);
  const seconds = Math.floor(ra / perSecond);
  const tenth = style === 'tenths' ? `.${ra % 10}` : '';
  const time = `${pad(Math.floor(seconds / 3600))}${pad(Math.floor(seconds / 60) % 60)}${pad(seconds % 60)}${tenth}`;
  const arc = `${pad(Math.floor(dec / 3600))}${pad(Math.floor(dec / 60) % 60)}${pad(dec % 60)}`;
  return `J${time}${sign}${arc}`;
}
