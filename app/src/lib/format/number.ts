const MINUS = '\u2212';
const THIN = '\u202f';
/** What stands where there is no number. */
export const NO_VALUE = '\u2013';

/** Fixed decimals with a true minus sign and thin-space thousands: `-12345.6` gives `−12 345.6`. */
export function fixed(value: number | null | undefined, decimals: number): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return NO_VALUE;
  const [whole = '', fraction] = Math.abs(value).toFixed(decimals).split('.');
  const grouped = whole.length > 4 ? whole.replace(/\B(?=(\d{3})+$)/g, THIN) : whole;
  const text = fraction === undefined ? grouped : `${grouped}.${fraction}`;
  const isZero = Number(text.replaceAll(THIN, '')) === 0;
  return value < 0 && !isZero ? `${MINUS}${text}` : text;
}

/** As {@link fixed}, always with a sign: `+143`. */
export function signed(value: number | null | undefined, decimals: number): string {
  const text = fixed(value, decimals);
  return value !== null && value !== undefined && value > 0 ? `+${text}` : text;
}

/** To a number of significant digits, never in powers of ten below 1e6. */
export function significant(value: number | null | undefined, digits: number): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return NO_VALUE;
  if (value === 0) return '0';
  const exponent = Math.floor(Math.log10(Math.abs(value)));
  if (exponent >= 6 || exponent < -5) return scientific(value, digits);
  return fixed(Number(value.toPrecision(digits)), Math.max(0, digits - 1 - exponent));
}

const RAISED = ['⁰', '¹', '²', '³', '⁴', '⁵', '⁶', '⁷', '⁸', '⁹'];

/** Power-of-ten form: `1.2 × 10⁹`. */
export function scientific(value: number, digits: number): string {
  const [mantissa = '', power = '0'] = value.toExponential(digits - 1).split('e');
  const raised = [...String(Math.abs(Number(power)))].map((digit) => RAISED[Number(digit)]).join('');
  return `${mantissa.replace('-', MINUS)}${THIN}×${THIN}10${Number(power) < 0 ? '⁻' : ''}${raised}`;
}

/** Decimals that an error justifies: two significant digits when it begins with 1, else one. */
export function errorDecimals(error: number): number {
  const exponent = Math.floor(Math.log10(error));
  const leading = Math.floor(error / 10 ** exponent + 1e-9);
  return Math.max(0, (leading === 1 ? 1 : 0) - exponent);
}

/** A value with its error, both to the digits the error justifies: `33.5 ± 3.0` is `34 ± 3`, `12.34 ± 0.41` is `12.3 ± 0.4`. */
export function withError(
  value: number | null | undefined,
  error: number | null | undefined,
  decimals: number,
): string {
  if (!error || !Number.isFinite(error) || error <= 0) return fixed(value, decimals);
  const places = errorDecimals(error);
  return `${fixed(value, places)} ± ${fixed(error, places)}`;
}

/** Probability in [0, 1] with the digits that matter near both ends: `0.84`, `0.996`, `<0.001`, `>0.999`. */
export function probability(value: number | null | undefined): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return NO_VALUE;
  if (value === 0 || value === 1) return fixed(value, 0);
  if (value < 0.001) return '<0.001';
  if (value > 0.999) return '>0.999';
  return fixed(value, value < 0.01 || value > 0.99 ? 3 : 2);
}

/** A count: `12 345`. */
export const count = (value: number | null | undefined): string => fixed(value, 0);

/** Pads behind the decimal point with unbreakable spaces, so that points align in a monospaced right-aligned column. */
export function alignPoint(text: string, decimals: number): string {
  const held = /\.(\d+)$/.exec(text)?.[1]?.length;
  const missing = held === undefined ? decimals + 1 : decimals - held;
  return text + '\u00a0'.repeat(Math.max(0, missing));
}

/** A probability for a column: the points of all rows stand under each other. */
export const probabilityCell = (value: number | null | undefined): string => alignPoint(probability(value), 3);
