import { DomainError } from '../domain-error.ts';
import { type MagnitudeHistogram, magnitudeHistogram } from './magnitude-histogram.ts';

/** Distribution of the counterpart's magnitude: a Gaussian core and a wide Gaussian tail. */
export interface CounterpartMagnitudes {
  magnitude: number;
  scatterMag: number;
  tailFraction: number;
  tailScatterMag: number;
}

/** Density of the counterpart's magnitude, per magnitude; it integrates to one. */
export function counterpartDensity(expected: CounterpartMagnitudes, magnitude: number): number {
  const { scatterMag, tailFraction, tailScatterMag } = expected;
  const apart = magnitude - expected.magnitude;
  const core = Math.exp(-0.5 * (apart / scatterMag) ** 2) / scatterMag;
  const tail = Math.exp(-0.5 * (apart / tailScatterMag) ** 2) / tailScatterMag;
  return ((1 - tailFraction) * core + tailFraction * tail) / Math.sqrt(2 * Math.PI);
}

/** Surface density of unrelated objects by magnitude, in equal bins. */
export interface NumberCounts {
  /** Faint edge of no bin lies beyond first + width x bins. */
  firstMag: number;
  widthMag: number;
  /** n(m), per square arcsec and magnitude, at the bin centres; positive, never falling towards the faint end. */
  density: Float64Array;
  /** N(< m), per square arcsec, at the faint edge of each bin, as counted. */
  cumulative: Float64Array;
  /** All objects with a magnitude, per square arcsec. */
  total: number;
  /** Magnitude at which nine tenths of the objects are brighter: where the table ends. */
  faintEnd: number;
}

/** Slope of the counts of galaxies brighter than any in the table: Euclidean, 0.6 dex per magnitude. */
const EUCLIDEAN = 0.6;

/**
 * Number counts of a catalogue, measured from itself.
 *
 * @param magnitudes magnitudes of all rows; NaN is left out
 * @param areaSquareArcsec area covered, square arcsec, positive
 * @param widthMag width of a bin, mag
 * @returns undefined where no row has a magnitude
 * @throws {DomainError} if area or width is not positive
 *
 * Bins are smoothed with their neighbours and kept from falling towards the faint end: there a table loses unrelated
 * objects and counterparts alike, so that the loss cancels in their ratio only if n is the true density. Bright bins
 * with few objects take the Euclidean slope from the first bin that has ten.
 *
 * Method: counterpart.
 */
export function countMagnitudes(
  magnitudes: ArrayLike<number>,
  areaSquareArcsec: number,
  widthMag = 0.25,
): NumberCounts | undefined {
  if (!(areaSquareArcsec > 0 && widthMag > 0)) {
    throw new DomainError(`countMagnitudes: area ${areaSquareArcsec} square arcsec, bins of ${widthMag} mag`);
  }
  return numberCounts(magnitudeHistogram(magnitudes, widthMag), areaSquareArcsec);
}

/**
 * Number counts from a histogram of a catalogue's magnitudes: see {@link countMagnitudes}.
 *
 * @param areaSquareArcsec area covered, square arcsec, positive
 */
export function numberCounts(
  { widthMag, firstBin, counts }: MagnitudeHistogram,
  areaSquareArcsec: number,
): NumberCounts | undefined {
  const bins = counts.length;
  if (bins === 0) return undefined;
  const firstMag = firstBin * widthMag;
  const total = counts.reduce((sum, count) => sum + count, 0);
  const cumulative = new Float64Array(bins);
  let sum = 0;
  for (let i = 0; i < bins; i++) cumulative[i] = (sum += counts[i]!) / areaSquareArcsec;
  let end = 0;
  while (cumulative[end]! < 0.9 * cumulative[bins - 1]!) end++;
  return {
    firstMag,
    widthMag,
    faintEnd: firstMag + widthMag * (end + 1),
    density: smoothed(counts, widthMag, areaSquareArcsec),
    cumulative,
    total: total / areaSquareArcsec,
  };
}

function smoothed(counts: Float64Array, widthMag: number, area: number): Float64Array {
  const bins = counts.length;
  const density = new Float64Array(bins);
  const at = (i: number) => counts[Math.min(bins - 1, Math.max(0, i))]!;
  let solid = 0;
  while (solid < bins - 1 && at(solid) < 10) solid++;
  if (at(solid) < 10) {
    // Fewer than ten in any bin: one Euclidean law through them all.
    const all = counts.reduce((sum, count) => sum + count, 0);
    let weight = 0;
    for (let i = 0; i < bins; i++) weight += 10 ** (EUCLIDEAN * widthMag * (i - bins));
    for (let i = 0; i < bins; i++) {
      density[i] = (all * 10 ** (EUCLIDEAN * widthMag * (i - bins))) / weight / widthMag / area;
    }
    return density;
  }
  for (let i = solid; i < bins; i++) {
    const mean = (at(i - 1) + 2 * at(i) + at(i + 1)) / 4;
    density[i] = Math.max(i > solid ? density[i - 1]! : 0, mean / widthMag / area);
  }
  for (let i = solid - 1; i >= 0; i--) {
    const law = density[i + 1]! * 10 ** (-EUCLIDEAN * widthMag);
    density[i] = Math.min(density[i + 1]!, Math.max(law, counts[i]! / widthMag / area));
  }
  return density;
}

/** n(m), per square arcsec and magnitude; Euclidean beyond the bright end, constant beyond the faint one. */
export function backgroundDensity(counts: NumberCounts, magnitude: number): number {
  const { firstMag, widthMag, density } = counts;
  const place = (magnitude - firstMag) / widthMag - 0.5;
  if (place <= 0) return density[0]! * 10 ** (EUCLIDEAN * widthMag * place);
  const last = density.length - 1;
  if (place >= last) return density[last]!;
  const i = Math.floor(place);
  return density[i]! + (place - i) * (density[i + 1]! - density[i]!);
}

/** N(< m), objects at least as bright, per square arcsec, as counted; Euclidean beyond the bright end. */
export function brighterDensity(counts: NumberCounts, magnitude: number): number {
  const { firstMag, widthMag, cumulative } = counts;
  const place = (magnitude - firstMag) / widthMag;
  if (place <= 0) return cumulative[0]! * 10 ** (EUCLIDEAN * widthMag * (place - 1));
  if (place >= cumulative.length) return counts.total;
  const i = Math.floor(place);
  const before = i === 0 ? 0 : cumulative[i - 1]!;
  return before + (place - i) * (cumulative[i]! - before);
}
