import { DomainError } from '../domain-error.ts';

/** One to three numbers of a sexagesimal value as written, with its sign and what its marks say. */
export interface SexagesimalText {
  readonly negative: boolean;
  readonly signed: boolean;
  /** Numbers as written, without sign: one, two or three. */
  readonly parts: readonly number[];
  /** Unit of the first number as marked: hours, degrees, or not marked. */
  readonly unit: 'hours' | 'degrees' | 'unmarked';
  /** How the numbers were set apart. */
  readonly separator: 'colon' | 'blank' | 'marks' | 'none';
  /** Whether the last number has a decimal point. */
  readonly fractional: boolean;
}

const MINUS = /[\u2212\u2010-\u2014\uFE63\uFF0D]/g;
const DEGREE_MARK = /[\u00B0\u00BA\u02DA]/g;
const MINUTE_MARK = /['\u2032\u2019\u02B9\u2018]/g;
const SECOND_MARK = /["\u2033\u201D\u201C\u02BA]|''/g;
const NUMBER = String.raw`\d+(?:\.\d*)?|\.\d+`;
const SEPARATED = new RegExp(
  String.raw`^(${NUMBER})(?:\s*:\s*(${NUMBER})(?:\s*:\s*(${NUMBER}))?|\s+(${NUMBER})(?:\s+(${NUMBER}))?)$`,
);
const MARKED = new RegExp(String.raw`^(${NUMBER})\s*([hd])(?:\s*(${NUMBER})\s*(?:m|$)(?:\s*(${NUMBER})\s*s?)?)?$`);

/** Text with the many signs for minus, hour, degree, minute, second brought to `-hdms`; `49s.4` becomes `49.4s`. */
function plainText(text: string): string {
  return text
    .replace(/[\u00A0\u2000-\u200A\u202F\u3000]/g, ' ')
    .trim()
    .replace(MINUS, '-')
    .replace(SECOND_MARK, 's')
    .replace(MINUTE_MARK, 'm')
    .replace(DEGREE_MARK, 'd')
    .replace(/\u02B0/g, 'h')
    .replace(/\u1D50/g, 'm')
    .replace(/\u02E2/g, 's')
    .toLowerCase()
    .replace(/s\.(\d+)$/, '.$1s');
}

/**
 * Takes a sexagesimal value apart without judging its range.
 *
 * @param text as written: `12:30:49.4`, `12 30 49.4`, `12h30m49.4s`, `187°42′21″`, `01 39.5`, with any usual minus
 * @returns undefined where the text is not of this form (a plain number is not, unless marked `h` or `d`)
 * @throws {DomainError} for a decimal comma or a fraction in any number but the last
 *
 * The sign is read as a character before any number is converted, so `-00 30 00` keeps it.
 */
export function readSexagesimal(text: string): SexagesimalText | undefined {
  const plain = plainText(text);
  const signed = /^[+-]/.test(plain);
  const negative = plain.startsWith('-');
  const body = (signed ? plain.slice(1) : plain).trim();
  if (/\d,\d/.test(body)) throw new DomainError(`"${text}" has a comma in a number; write a decimal point`);
  const marked = MARKED.exec(body);
  const separated = marked ? null : SEPARATED.exec(body);
  const match = marked ?? separated;
  if (!match) return undefined;
  const written = marked ? [marked[1], marked[3], marked[4]] : match.slice(1);
  const numbers = written.filter((n): n is string => n !== undefined);
  if (numbers.slice(0, -1).some((n) => n.includes('.'))) {
    throw new DomainError(`"${text}" has a decimal point before its last number; only the last may have one`);
  }
  return {
    negative,
    signed,
    parts: numbers.map(Number),
    unit: marked ? (marked[2] === 'h' ? 'hours' : 'degrees') : 'unmarked',
    separator: marked ? (numbers.length > 1 ? 'marks' : 'none') : body.includes(':') ? 'colon' : 'blank',
    fractional: numbers.at(-1)!.includes('.'),
  };
}

/**
 * Adds up the parts of a sexagesimal value.
 *
 * @returns magnitude in the unit of the first part, without sign
 * @throws {DomainError} for minutes of 60 or more, or seconds above 60; seconds of exactly 60 are carried and warned of
 */
export function sumParts(text: string, parts: readonly number[], warnings: string[]): number {
  const [first = 0, minutes = 0, seconds = 0] = parts;
  if (minutes >= 60) throw new DomainError(`"${text}": minutes must be below 60, found ${minutes}`);
  if (seconds > 60) throw new DomainError(`"${text}": seconds must be below 60, found ${seconds}`);
  if (seconds === 60)
    warnings.push(`"${text}": 60 seconds were carried to the next minute; the value was rounded when written`);
  return first + (minutes + seconds / 60) / 60;
}
