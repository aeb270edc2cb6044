import type { PlotPoint } from '@eremite/shared/contracts/plot';
import type { Chart } from './chart.ts';
import { VERDICT_SYMBOLS } from './verdict-symbols.ts';

/** What a plot shows, in words: for those who cannot see it. */
export function chartSummary(
  { title, x, y }: Chart,
  points: readonly PlotPoint[],
  lit: ReadonlySet<string> | null,
): string {
  const placed = points.filter((point) => x.value(point) !== null && y.value(point) !== null);
  const counts = VERDICT_SYMBOLS.map(
    ([verdict]) => [verdict, placed.filter((p) => p.starlight === verdict).length] as const,
  )
    .filter(([, n]) => n > 0)
    .map(([verdict, n]) => `${n} ${verdict}`);
  const left = points.length - placed.length;
  return [
    `${title}: ${y.label} against ${x.label} of ${placed.length} detections`,
    counts.join(', ') || 'none can be placed',
    ...(left > 0 ? [`${left} cannot be placed`] : []),
    ...(lit ? [`${lit.size} inside the brush`] : []),
    'the table below lists them',
  ].join('; ');
}
