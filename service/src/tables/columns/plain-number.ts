const POWERS_OF_TEN = Float64Array.from({ length: 23 }, (_, exponent) => Number(`1e${exponent}`));
const DOT = 46;

/**
 * Reads `bytes[start .. end]` as a decimal number: sign, digits, `decimal` (a byte, normally the point), exponent.
 * Equals `Number()` of the same text for every such number; anything else, also hex and blanks, is NaN.
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
  if (i < end && bytes[i] === decimal) {
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
  let exponent = 0;
  if (i < end) {
    if ((bytes[i]! | 32) !== 101) return NaN;
    i++;
    const minus = bytes[i] === 45;
    if (minus || bytes[i] === 43) i++;
    if (i >= end) return NaN;
    for (; i < end; i++) {
      byte = bytes[i]! - 48;
      if (byte < 0 || byte > 9) return NaN;
      if (exponent < 100_000) exponent = exponent * 10 + byte;
    }
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
  return Number(decimal === DOT ? text : text.replace(String.fromCharCode(decimal), '.'));
}
