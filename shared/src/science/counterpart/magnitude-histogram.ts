/** Numbers of objects by magnitude, in equal bins; those of parts of a table add up to that of the table. */
export interface MagnitudeHistogram {
  widthMag: number;
  /** Bin k holds magnitudes from (firstBin + k) widthMag up to the next. */
  firstBin: number;
  /** Empty where no object has a magnitude. */
  counts: Float64Array;
}

/**
 * Counts magnitudes.
 *
 * @param magnitudes magnitude of each row; NaN and infinities are left out
 * @param widthMag width of a bin, mag, positive
 * @param counts whether a row counts; all unless given
 */
export function magnitudeHistogram(
  magnitudes: ArrayLike<number>,
  widthMag: number,
  counts?: (row: number) => boolean,
): MagnitudeHistogram {
  let low = Infinity;
  let high = -Infinity;
  for (let i = 0; i < magnitudes.length; i++) {
    const m = magnitudes[i]!;
    if (!Number.isFinite(m)) continue;
    if (m < low) low = m;
    if (m > high) high = m;
  }
  const firstBin = high >= low ? Math.floor(low / widthMag) : 0;
  const bins = new Float64Array(high >= low ? Math.floor(high / widthMag) - firstBin + 1 : 0);
  for (let i = 0; i < magnitudes.length; i++) {
    const m = magnitudes[i]!;
    if (Number.isFinite(m) && (!counts || counts(i))) bins[Math.floor(m / widthMag) - firstBin]!++;
  }
  return trimmed({ widthMag, firstBin, counts: bins });
}

/** Sum of histograms of the same bins. */
export function addHistograms(parts: readonly MagnitudeHistogram[], widthMag: number): MagnitudeHistogram {
  const filled = parts.filter(({ counts }) => counts.length > 0);
  if (filled.length === 0) return { widthMag, firstBin: 0, counts: new Float64Array(0) };
  const firstBin = Math.min(...filled.map((part) => part.firstBin));
  const end = Math.max(...filled.map((part) => part.firstBin + part.counts.length));
  const counts = new Float64Array(end - firstBin);
  for (const part of filled) {
    for (let k = 0; k < part.counts.length; k++) counts[part.firstBin - firstBin + k]! += part.counts[k]!;
  }
  return { widthMag, firstBin, counts };
}

/** Without empty bins at its ends, so that the same objects give the same histogram in whatever parts they came. */
function trimmed({ widthMag, firstBin, counts }: MagnitudeHistogram): MagnitudeHistogram {
  let from = 0;
  let to = counts.length;
  while (from < to && counts[from] === 0) from++;
  while (to > from && counts[to - 1] === 0) to--;
  return { widthMag, firstBin: to > from ? firstBin + from : 0, counts: counts.slice(from, to) };
}
