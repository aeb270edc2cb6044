import { DomainError } from '../domain-error.ts';
import { readSexagesimal, sumParts } from './sexagesimal-text.ts';

/** A coordinate read from text: degrees, and what the reader should be told. */
export interface ParsedAngle {
  readonly deg: number;
  readonly warnings: readonly string[];
}

const DECIMAL = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?$/i;

/** A plain decimal number with any usual minus sign; undefined if the text is none. */
function readDecimal(text: string): number | undefined {
  const plain = text.trim().replace(/^[\u2212\u2010-\u2014\uFE63\uFF0D]/, '-');
  return DECIMAL.test(plain) ? Number(plain) : undefined;
}

function refuseEmpty(text: string, what: string): void {
  if (text.trim() === '') throw new DomainError(`${what} is empty`);
}

function wrapRightAscension(text: string, deg: number, warnings: string[]): number {
  if (deg >= 0 && deg < 360) return deg;
  if (deg === 360) {
    warnings.push(`"${text}": 360 degrees were read as 0`);
    return 0;
  }
  if (deg < 0 && deg >= -180) {
    warnings.push(`"${text}": a negative right ascension was brought into 0 to 360 degrees`);
    // -1e-17 + 360 rounds to 360.
    return deg + 360 === 360 ? 0 : deg + 360;
  }
  throw new DomainError(`"${text}": right ascension must lie in 0 to 360 degrees (or -180 to 180), found ${deg}`);
}

/**
 * Right ascension from text.
 *
 * @param text decimal degrees, or sexagesimal: hours unless marked with `d` or `°`
 * @returns degrees in [0, 360), and warnings for what was accepted with doubt
 * @throws {DomainError} that names the fault and the mend
 *
 * Whether a whole column of decimals holds hours cannot be seen from one cell; see `mayBeHours`.
 * Source: IAU notation, and the rules of practice stated with each message.
 */
export function parseRightAscension(text: string): ParsedAngle {
  refuseEmpty(text, 'right ascension');
  const warnings: string[] = [];
  const decimal = readDecimal(text);
  if (decimal !== undefined) return { deg: wrapRightAscension(text, decimal, warnings), warnings };
  const value = readSexagesimal(text);
  if (!value) {
    throw new DomainError(`"${text}" is not a right ascension; write degrees (187.7059) or hours (12:30:49.4)`);
  }
  if (value.parts.length === 2 && value.separator === 'blank') {
    if (!value.fractional || value.signed) {
      throw new DomainError(
        `"${text}": two numbers could be hours and minutes or RA and Dec; split the column or write hh:mm:ss`,
      );
    }
    warnings.push(`"${text}" was read as hours and decimal minutes`);
  } else if (value.parts.length === 2 && value.separator === 'colon') {
    warnings.push(`"${text}" was read as hours and minutes`);
  }
  const amount = sumParts(text, value.parts, warnings);
  if (value.unit === 'degrees') {
    return { deg: wrapRightAscension(text, value.negative ? -amount : amount, warnings), warnings };
  }
  if (value.negative) {
    throw new DomainError(`"${text}": right ascension in hours has no minus sign; is this a declination?`);
  }
  if (amount === 24) warnings.push(`"${text}": 24 hours were read as 0`);
  if (amount > 24) {
    throw new DomainError(`"${text}": right ascension must be below 24 hours; mark degrees with d, as in 187d42m21s`);
  }
  return { deg: amount === 24 ? 0 : amount * 15, warnings };
}

/**
 * Declination from text.
 *
 * @param text decimal degrees, or sexagesimal degrees; a plus or minus sign belongs to the whole value
 * @returns degrees in [-90, 90], and warnings for what was accepted with doubt
 * @throws {DomainError} that names the fault and the mend
 */
export function parseDeclination(text: string): ParsedAngle {
  refuseEmpty(text, 'declination');
  const warnings: string[] = [];
  let deg = readDecimal(text);
  if (deg === undefined) {
    const value = readSexagesimal(text);
    if (!value) {
      throw new DomainError(`"${text}" is not a declination; write degrees (12.3911) or sexagesimal (+12:23:28)`);
    }
    if (value.unit === 'hours') throw new DomainError(`"${text}": declination is in degrees, not hours`);
    if (value.parts.length === 2 && value.unit === 'unmarked') {
      warnings.push(`"${text}" was read as degrees and ${value.fractional ? 'decimal ' : ''}minutes`);
    }
    const amount = sumParts(text, value.parts, warnings);
    deg = value.negative ? -amount : amount;
  }
  if (!(Math.abs(deg) <= 90)) {
    throw new DomainError(`"${text}": declination must lie in -90 to +90 degrees, found ${deg}`);
  }
  return { deg, warnings };
}

/** Degrees in the units that may follow a plain angle. */
const UNITS: Readonly<Record<string, number>> = {
  deg: 1,
  degree: 1,
  degrees: 1,
  d: 1,
  '°': 1,
  arcmin: 1 / 60,
  "'": 1 / 60,
  '′': 1 / 60,
  '’': 1 / 60,
  arcsec: 1 / 3600,
  '"': 1 / 3600,
  '″': 1 / 3600,
  '”': 1 / 3600,
  mas: 1 / 3.6e6,
  h: 15,
  rad: 180 / Math.PI,
};

/**
 * An angle from text, such as a beam width or a search radius.
 *
 * @param text a number with an optional unit (`3.5′`, `210 arcsec`, `0.1 deg`) or sexagesimal degrees (hours with `h`)
 * @returns degrees, of any size and sign; a number without a unit is degrees
 * @throws {DomainError} that names the fault and the mend
 */
export function parseAngle(text: string): ParsedAngle {
  refuseEmpty(text, 'angle');
  const decimal = readDecimal(text);
  if (decimal !== undefined) return { deg: decimal, warnings: [] };
  const withUnit = /^(.*?[\d.])\s*([^\d.\s][^\d]*)$/.exec(text.trim());
  const number = withUnit ? readDecimal(withUnit[1]!) : undefined;
  if (withUnit && number !== undefined) {
    const unit = UNITS[withUnit[2]!.trim().toLowerCase()];
    if (unit === undefined) {
      throw new DomainError(`"${text}": unknown unit "${withUnit[2]}"; use deg, arcmin, arcsec, mas, rad or h`);
    }
    return { deg: number * unit, warnings: [] };
  }
  const value = readSexagesimal(text);
  if (!value) throw new DomainError(`"${text}" is not an angle; write a number with a unit, as in 3.5 arcmin`);
  const warnings: string[] = [];
  const amount = sumParts(text, value.parts, warnings) * (value.unit === 'hours' ? 15 : 1);
  return { deg: value.negative ? -amount : amount, warnings };
}
