/** Digits of an error that are worth writing. */
const ERROR_DIGITS = 2;

/**
 * A value rounded to the second significant digit of its error.
 *
 * @param value NaN and null stay missing
 * @param error in the unit of the value; without a usable one four significant digits are kept
 * @returns the rounded value; common practice (Particle Data Group, Review of Particle Physics, section 5.3)
 */
export function roundByError(value: number | null, error: number | null): number | null {
  if (value === null || !Number.isFinite(value)) return null;
  if (error === null || !Number.isFinite(error) || error <= 0) return Number(value.toPrecision(4));
  return roundTo(value, ERROR_DIGITS - 1 - Math.floor(Math.log10(Number(error.toPrecision(ERROR_DIGITS)))));
}

/** An error rounded to two significant digits. */
export function roundError(error: number | null): number | null {
  return error === null || !Number.isFinite(error) || error <= 0 ? null : Number(error.toPrecision(ERROR_DIGITS));
}

/** Value and error as people write them, `65.0 ± 2.9`; null where there is no value. */
export function withError(value: number | null, error: number | null): string | null {
  const rounded = roundByError(value, error);
  const rest = roundError(error);
  if (rounded === null || rest === null) return rounded === null ? null : String(rounded);
  const decimals = Math.max(0, ERROR_DIGITS - 1 - Math.floor(Math.log10(rest)));
  return `${rounded.toFixed(decimals)} ± ${rest.toFixed(decimals)}`;
}

function roundTo(value: number, decimals: number): number {
  if (decimals >= 0) return Number(value.toFixed(Math.min(decimals, 15)));
  const unit = 10 ** -decimals;
  return Math.round(value / unit) * unit;
}
