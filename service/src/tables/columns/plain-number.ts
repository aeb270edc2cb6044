import { exponentForm, fixedForm, SHORTEST, SPELLED, type WrittenForm, writtenText } from './written-form.ts';

const POWERS_OF_TEN = Float64Array.from({ length: 23 }, (_, exponent) => Number(`1e${exponent}`));
const DOT = 46;

/** How the number that `parsePlainNumber` read last was written. A second answer, without an object for each cell. */
let form: WrittenForm = SHORTEST;
export const formOfLast = (): WrittenForm => form;

/**
 * Reads `bytes[start .. end]` as a decimal number: sign, digits, `decimal` (a byte, normally the point), exponent.
 * Equals `Number()` of the same text for every such number; anything else, also hex and blanks, is NaN.
 * {@link formOfLast} tells how it was written.
 * Up to 15 digits and powers of ten up to 22 are exact in a double, so one operation rounds correctly (Clinger 1990).
 */
export function parsePlainNumber(bytes: Buffer, start: number, end: number, decimal = DOT): number {
  let i = start;
  let byte = bytes[i]!;
  const negative = byte === 45;
  if (negative || byte === 43) i++;
  let mantissa = 0;
  let digits = 0;
  let fraction = 0;
  const first = i;
  let seen = 0;
  for (; i < end; i++) {
    byte = bytes[i]! - 48;
    if (byte < 0 || byte > 9) break;
    mantissa = mantissa * 10 + byte;
    if (mantissa !== 0) digits++;
  }
  seen = i - first;
  const hasPoint = i < end && bytes[i] === decimal;
  if (hasPoint) {
    const point = ++i;
    for (; i < end; i++) {
      byte = bytes[i]! - 48;
      if (byte < 0 || byte > 9) break;
      mantissa = mantissa * 10 + byte;
      if (mantissa !== 0) digits++;
    }
    fraction = i - point;
    seen += fraction;
  }
  if (seen === 0) return NaN;
  // A sign and leading zeros that nobody needs, or a point without digits on both sides, are spellings of their own.
  const whole = hasPoint ? seen - fraction : seen;
  const plus = bytes[start] === 43;
  const usual = whole > 0 && (whole === 1 || bytes[first] !== 48) && fraction > 0 === hasPoint;
  let exponent = 0;
  if (i >= end) {
    if (!usual) form = SPELLED;
    else if (hasPoint) form = fixedForm(fraction, plus, decimal !== DOT);
    else form = plus ? SPELLED : SHORTEST;
  } else {
    const letter = bytes[i]!;
    if ((letter | 32) !== 101) return NaN;
    i++;
    const minus = bytes[i] === 45;
    const signed = minus || bytes[i] === 43;
    const digitsAt = signed ? i + 1 : i;
    i = digitsAt;
    if (i >= end) return NaN;
    for (; i < end; i++) {
      byte = bytes[i]! - 48;
      if (byte < 0 || byte > 9) return NaN;
      if (exponent < 100_000) exponent = exponent * 10 + byte;
    }
    const padded = signed && end - digitsAt === (exponent > 99 ? 3 : 2) && !(minus && exponent === 0);
    const scientific = usual && whole === 1 && !plus && padded && decimal === DOT;
    const normal = bytes[first] !== 48 || (mantissa === 0 && exponent === 0);
    form = scientific && normal ? exponentForm(fraction, letter === 69) : SPELLED;
    if (minus) exponent = -exponent;
  }
  if (mantissa === 0) return negative ? -0 : 0;
  exponent -= fraction;
  if (digits > 15 || exponent < -22 || exponent > 22) return slowNumber(bytes, start, end, decimal);
  const value = exponent < 0 ? mantissa / POWERS_OF_TEN[-exponent]! : mantissa * POWERS_OF_TEN[exponent]!;
  return negative ? -value : value;
}

function slowNumber(bytes: Buffer, start: number, end: number, decimal: number): number {
  const text = bytes.toString('latin1', start, end);
  const value = Number(decimal === DOT ? text : text.replace(String.fromCharCode(decimal), '.'));
  // More digits than a double holds: only some of them come back.
  if (!Number.isFinite(value) || writtenText(value, form) !== text) form = SPELLED;
  return value;
}
