/** Numbers kept as whole ones: value = (code - 1 + from) / 10^decimals, code 0 where missing. */
export interface TightFloats {
  decimals: number;
  from: number;
  codes: Uint8Array | Uint16Array | Uint32Array;
}

/** More decimals than catalogues print; a binary fraction of full length fails at the first cell. */
const MOST_DECIMALS = 10;
/** Whole numbers beyond this could be rounded on the way. */
const MOST_WHOLE = 2 ** 50;
const MOST_CODE = 2 ** 32 - 1;

/**
 * Finds whole numbers for decimal ones, as a printed catalogue holds them: 21.15253 is 2115253 / 10^5, and dividing
 * gives back the same double bit for bit, since both it and reading the text round the same fraction once.
 *
 * @returns undefined where some value is no decimal of ten places or fewer, or where they span more than 32 bits
 */
export function tightFloats(values: Float64Array): TightFloats | undefined {
  const decimals = decimalsOf(values);
  if (decimals === undefined) return undefined;
  const scale = 10 ** decimals;
  let low = Infinity;
  let high = -Infinity;
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    if (value < low) low = value;
    if (value > high) high = value;
  }
  if (low > high) [low, high] = [0, 0];
  const from = Math.round(low * scale);
  const most = Math.round(high * scale) - from + 1;
  if (!(most <= MOST_CODE) || Math.max(Math.abs(from), Math.abs(from + most)) > MOST_WHOLE) return undefined;
  const codes = room(most, values.length);
  return fill(codes, values, scale, from) ? { decimals, from, codes } : undefined;
}

/** The numbers again, exactly; NaN where missing. */
export function looseFloats({ decimals, from, codes }: TightFloats): Float64Array {
  const values = new Float64Array(codes.length);
  const scale = 10 ** decimals;
  const base = from - 1;
  for (let i = 0; i < codes.length; i++) {
    const code = codes[i]!;
    values[i] = code === 0 ? NaN : (code + base) / scale;
  }
  return values;
}

/** An array whose elements hold numbers from 0 to `most`. */
export function room(most: number, length: number): Uint8Array | Uint16Array | Uint32Array {
  if (most < 2 ** 8) return new Uint8Array(length);
  return most < 2 ** 16 ? new Uint16Array(length) : new Uint32Array(length);
}

function decimalsOf(values: Float64Array): number | undefined {
  let decimals = 0;
  let scale = 1;
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    // NaN is told by being unlike itself; it has no decimals.
    while (Math.round(value * scale) / scale !== value && value === value) {
      if (++decimals > MOST_DECIMALS) return undefined;
      scale = 10 ** decimals;
    }
  }
  return decimals;
}

/** False at the first value that would not come back as it is; a negative zero is such a one. */
function fill(codes: TightFloats['codes'], values: Float64Array, scale: number, from: number): boolean {
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    if (value !== value) continue;
    const whole = Math.round(value * scale);
    if (whole / scale !== value || (whole === 0 && 1 / value < 0)) return false;
    codes[i] = whole - from + 1;
  }
  return true;
}
