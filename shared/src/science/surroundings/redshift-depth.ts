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
  const width = 0.5;
  const all = new Map<number, [rows: number, withVelocity: number]>();
  let total = 0;
  let moving = 0;
  for (let i = 0; i < magnitudes.length; i++) {
    const m = magnitudes[i]!;
    if (!(m === m)) continue;
    const bin = Math.floor(m / width);
    const counts = all.get(bin) ?? [0, 0];
    counts[0]++;
    if (hasVelocity(i)) {
      counts[1]++;
      moving++;
    }
    all.set(bin, counts);
    total++;
  }
  if (total < 100) return undefined;
  const bins = [...all.keys()].sort((a, b) => a - b);
  let peak = bins[0]!;
  for (const bin of bins) if (all.get(bin)![0] >= all.get(peak)![0]) peak = bin;
  const onlyRedshifts = moving >= ONLY_REDSHIFTS * total;
  let reached: number | undefined;
  for (const bin of bins) {
    const [rows, withVelocity] = all.get(bin)!;
    if (rows >= 20 && withVelocity < completeness * rows) break;
    if (onlyRedshifts && bin > peak) break;
    if (rows >= 20) reached = (bin + 1) * width;
  }
  return reached;
}
