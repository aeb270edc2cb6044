const COLON = 58;
const BLANK = 32;
const POINT = 46;
const digit = (byte: number): number => (byte >= 48 && byte <= 57 ? byte - 48 : -1);

/**
 * A sexagesimal value in its plainest form, `[+-]d(d)(d):dd:dd(.d…)` with colons or single blanks, straight from its
 * bytes: what nearly every cell of a million looks like. Equal to the parser of `science/sky` to the last bit.
 *
 * @returns the value in units of the first part, minus zero kept as a negative zero; NaN for any other form, any part
 *   out of range, or more than 15 digits of seconds: those go to the parser, which judges and explains
 */
export function plainSexagesimal(bytes: Uint8Array, start: number, end: number): number {
  let at = start;
  const sign = bytes[at];
  const negative = sign === 45;
  if (negative || sign === 43) at++;
  let first = 0;
  let digits = 0;
  for (; at < end && digits < 4; at++, digits++) {
    const value = digit(bytes[at]!);
    if (value < 0) break;
    first = first * 10 + value;
  }
  const mark = bytes[at];
  if (digits === 0 || digits > 3 || at + 6 > end || (mark !== COLON && mark !== BLANK) || bytes[at + 3] !== mark)
    return NaN;
  const minutes = twoDigits(bytes, at + 1);
  const whole = twoDigits(bytes, at + 4);
  if (minutes < 0 || whole < 0 || minutes >= 60 || whole >= 60) return NaN;
  at += 6;
  let seconds = whole;
  if (at < end) {
    if (bytes[at] !== POINT || end - at > 14) return NaN;
    let scale = 1;
    for (at++; at < end; at++) {
      const value = digit(bytes[at]!);
      if (value < 0) return NaN;
      seconds = seconds * 10 + value;
      scale *= 10;
    }
    seconds /= scale;
  }
  const amount = first + (minutes + seconds / 60) / 60;
  return negative ? -amount : amount;
}

function twoDigits(bytes: Uint8Array, at: number): number {
  const tens = digit(bytes[at]!);
  const ones = digit(bytes[at + 1]!);
  return tens < 0 || ones < 0 ? -1 : tens * 10 + ones;
}
