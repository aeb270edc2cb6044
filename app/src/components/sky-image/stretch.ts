/** How values become brightness: in proportion, with faint light lifted, or by rank so that every level is equally used. */
export const STRETCHES = ['linear', 'asinh', 'percentile'] as const;
export type Stretch = (typeof STRETCHES)[number];

/** Values beyond which everything is dark or bright. */
export interface Cuts {
  low: number;
  high: number;
}

/** Values looked at to choose the cuts of a large image. */
const MOST_SAMPLED = 40_000;
/** The asinh stretch in sigmas of the sky: dark below the first, in proportion up to the second, bright at least at the third. Choice. */
const ASINH_SIGMAS = { dark: -1.5, linear: 2, bright: 12 } as const;

/** A sorted sample of the values that are known. */
export function sortedSample(values: Float32Array): Float32Array {
  const stride = Math.max(1, Math.ceil(values.length / MOST_SAMPLED));
  const sample = new Float32Array(Math.ceil(values.length / stride));
  let held = 0;
  for (let i = 0; i < values.length; i += stride) {
    if (!Number.isNaN(values[i]!)) sample[held++] = values[i]!;
  }
  return sample.subarray(0, held).sort();
}

/**
 * Cuts that leave a share of the values inside, as much of the rest above as below; never equal.
 * @param percent share inside, 50 to 100
 */
export function cutsOf(sorted: Float32Array, percent: number): Cuts {
  if (sorted.length === 0) return { low: 0, high: 1 };
  const outside = (1 - percent / 100) / 2;
  const at = (share: number) => sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))]!;
  const [low, high] = [at(outside), at(1 - outside)];
  return high > low ? { low, high } : { low: low - 0.5, high: low + 0.5 };
}

/** Brightness in [0, 1] of a value. */
export function stretcher(stretch: Stretch, sorted: Float32Array, percent: number): (value: number) => number {
  const { low, high } = cutsOf(sorted, percent);
  const part = (value: number) => Math.min(1, Math.max(0, (value - low) / (high - low)));
  if (stretch === 'linear') return part;
  if (stretch === 'asinh') return aboutSky(sorted, high);
  return (value) => rank(sorted, value) / Math.max(1, sorted.length);
}

/** Light above the sky, so that blank sky stays dark however little else there is in the image. */
function aboutSky(sorted: Float32Array, high: number): (value: number) => number {
  const at = (share: number) => sorted[Math.floor(share * (sorted.length - 1))] ?? 0;
  const sky = at(0.5);
  // Half the range of the middle 68 per cent: one sigma of a Gaussian.
  const sigma = (at(0.8413) - at(0.1587)) / 2 || 1;
  const dark = sky + ASINH_SIGMAS.dark * sigma;
  const scale = ASINH_SIGMAS.linear * sigma;
  const full = Math.asinh((Math.max(high, sky + ASINH_SIGMAS.bright * sigma) - dark) / scale);
  return (value) => Math.min(1, Math.max(0, Math.asinh((value - dark) / scale) / full));
}

/** How many of the sorted values are below. */
function rank(sorted: Float32Array, value: number): number {
  let [from, to] = [0, sorted.length];
  while (from < to) {
    const middle = (from + to) >> 1;
    if (sorted[middle]! < value) from = middle + 1;
    else to = middle;
  }
  return from;
}
