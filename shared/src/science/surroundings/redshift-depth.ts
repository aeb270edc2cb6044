import { type MagnitudeHistogram, magnitudeHistogram } from '../counterpart/magnitude-histogram.ts';

/** From this share of rows with a velocity on, a table lists nothing but redshifts. Our choice. */
const ONLY_REDSHIFTS = 0.95;

/**
 * Magnitude to which the rows of a table have redshifts, measured from the table.
 *
 * @param magnitudes magnitude of each row, NaN where missing
 * @param hasVelocity whether the row has a velocity
 * @param completeness share that must have one, in every half magnitude up to the limit
 * @returns the faint edge, same system; undefined where it cannot be told: fewer than a hundred rows with a magnitude, or
 *   the brightest half magnitude with twenty rows already falls short
 *
 * A table of nothing but redshifts says nothing of what has none: its own turnover is not a depth, so the limit is put
 * at the half magnitude with most rows, beyond which rows are evidently lost.
 */
export function measuredRedshiftDepth(
  magnitudes: ArrayLike<number>,
  hasVelocity: (row: number) => boolean,
  completeness = 0.85,
): number | undefined {
  return redshiftDepthOf(
    magnitudeHistogram(magnitudes, REDSHIFT_BIN_MAG),
    magnitudeHistogram(magnitudes, REDSHIFT_BIN_MAG, hasVelocity),
    completeness,
  );
}

/** Bins in which redshifts are counted, mag. */
export const REDSHIFT_BIN_MAG = 0.5;

/**
 * The same from counts in bins of {@link REDSHIFT_BIN_MAG}: see {@link measuredRedshiftDepth}.
 *
 * @param all rows with a magnitude
 * @param withVelocity those of them that have a velocity
 */
export function redshiftDepthOf(
  all: MagnitudeHistogram,
  withVelocity: MagnitudeHistogram,
  completeness = 0.85,
): number | undefined {
  const sum = ({ counts }: MagnitudeHistogram) => counts.reduce((total, count) => total + count, 0);
  const [total, moving] = [sum(all), sum(withVelocity)];
  if (total < 100) return undefined;
  const rowsAt = (bin: number) => all.counts[bin - all.firstBin]!;
  const bins = Array.from(all.counts.keys(), (k) => all.firstBin + k).filter((bin) => rowsAt(bin) > 0);
  let peak = bins[0]!;
  for (const bin of bins) if (rowsAt(bin) >= rowsAt(peak)) peak = bin;
  const onlyRedshifts = moving >= ONLY_REDSHIFTS * total;
  let reached: number | undefined;
  for (const bin of bins) {
    const rows = rowsAt(bin);
    const known = withVelocity.counts[bin - withVelocity.firstBin] ?? 0;
    if (rows >= 20 && known < completeness * rows) break;
    if (onlyRedshifts && bin > peak) break;
    if (rows >= 20) reached = (bin + 1) * REDSHIFT_BIN_MAG;
  }
  return reached;
}
