/** Room beyond the outermost values, as a share of their span. */
const MARGIN = 0.06;

/** Least and largest of the values with a margin; `otherwise` where there are none. */
export function extentOf(values: readonly (number | null)[], otherwise: [number, number]): [number, number] {
  let [low, high] = [Infinity, -Infinity];
  for (const value of values) {
    if (value === null || !Number.isFinite(value)) continue;
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  if (low > high) return otherwise;
  const margin = Math.max(0.1, (high - low) * MARGIN);
  return [low - margin, high + margin];
}
