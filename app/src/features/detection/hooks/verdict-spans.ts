/** A stretch of distances over which a verdict stays the same. */
export interface VerdictSpan<V> {
  verdict: V;
  fromMpc: number;
  toMpc: number;
}

/**
 * Stretches of equal verdicts along points in order of distance. A change lies between two points; it is put at the
 * geometric mean of them.
 */
export function verdictSpans<P extends { angularMpc: number }, V>(
  points: readonly P[],
  verdictOf: (point: P) => V,
): VerdictSpan<V>[] {
  const spans: VerdictSpan<V>[] = [];
  points.forEach((point, i) => {
    const last = spans.at(-1);
    const verdict = verdictOf(point);
    if (last?.verdict === verdict) {
      last.toMpc = point.angularMpc;
      return;
    }
    const edge = last ? Math.sqrt(points[i - 1]!.angularMpc * point.angularMpc) : point.angularMpc;
    if (last) last.toMpc = edge;
    spans.push({ verdict, fromMpc: edge, toMpc: point.angularMpc });
  });
  return spans;
}
