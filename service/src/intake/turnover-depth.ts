import type { Histogram } from './catalogue-facts.ts';

/** A depth read off the counts of a catalogue; it is shown and never taken unasked. */
export interface TurnoverDepth {
  /** Magnitude at which the counts turn over, in the system of the counts. */
  magnitude: number;
  /** 1-sigma uncertainty, mag. */
  uncertainty: number;
}

/** Fewer objects than this show no turn-over. */
const LEAST_COUNT = 500;
/** The fullest bin needs so many, so that its neighbours differ by more than chance. */
const LEAST_PEAK = 30;

/**
 * Depth of a band from where its counts per magnitude stop rising: the vertex of a parabola through the logarithms of the
 * fullest bin (counts smoothed over three) and its neighbours. About the magnitude of 50 to 80 per cent completeness; it
 * is no 5-sigma depth, and for a table cut at a magnitude it is the cut.
 *
 * @param histogram counts in bins of equal width, limits left out
 * @returns undefined where the counts show no turn-over: too few objects, or falling from the brightest on
 *
 * Common practice; the uncertainty is a bin, for the counts are smoothed over three, with the Poisson error of the vertex
 * in quadrature.
 */
export function turnoverDepth({ start, step, counts }: Histogram): TurnoverDepth | undefined {
  const total = counts.reduce((sum, count) => sum + count, 0);
  if (total < LEAST_COUNT) return undefined;
  // Counts that only fall are those of a survey that is not limited by its depth.
  if (counts.every((count) => count <= counts[0]!)) return undefined;
  // Beyond the faintest bin there is nothing; before the brightest, nothing is known.
  const padded = [...counts, 0, 0];
  const smooth = padded.map((count, i) => ((padded[i - 1] ?? count) + count + (padded[i + 1] ?? 0)) / 3);
  let peak = 0;
  for (let i = 1; i < smooth.length; i++) if (smooth[i]! >= smooth[peak]!) peak = i;
  if (smooth[peak]! < LEAST_PEAK) return undefined;
  const before = smooth[peak - 1];
  const after = smooth[peak + 1] ?? 0;
  if (before === undefined || !(before > 0)) return undefined;
  const [a, b, c] = [Math.log(before), Math.log(smooth[peak]!), Math.log(Math.max(after, 1))];
  const curvature = a - 2 * b + c;
  const shift = curvature < 0 ? Math.max(-0.5, Math.min(0.5, (a - c) / (2 * curvature))) : 0;
  // Variance of the logarithm of a mean over three bins is 1 / (3 n).
  const noise = Math.sqrt((1 / (3 * before) + 1 / (3 * Math.max(after, 1))) / 4);
  const vertexError = curvature < 0 ? Math.min(1, noise / -curvature) : 1;
  return {
    magnitude: start + (peak + 0.5 + shift) * step,
    uncertainty: step * Math.hypot(1, vertexError),
  };
}
