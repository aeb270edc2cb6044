import type { BandLimit } from '../contracts/verdict.ts';
import { type DrawingTheme, PAPER } from './drawing-theme.ts';
import type { DrawnEvidence } from './drawn-evidence.ts';
import { numberText, probabilityText } from './measure-text.ts';
import { roundStep } from './ruler.ts';
import { element, px, textAt } from './svg.ts';

export interface LimitsOptions {
  width?: number;
  theme?: DrawingTheme;
}

const ROW = 34;
const TOP = 16;
const BOTTOM = 34;
const LEFT = 116;
const RIGHT = 74;
const LONGEST_NAME = 22;

/** What the chart shows, a sentence a band: for those who cannot see it. */
export function limitsSummary(limits: readonly BandLimit[]): string {
  if (limits.length === 0) return 'No catalogue with a band was searched.';
  return limits
    .map(({ band, expectedMagnitude, depthPoint, completeness, reason }) => {
      const expected =
        expectedMagnitude === null ? 'nothing can be expected' : `${numberText(expectedMagnitude, 1)} mag expected`;
      const depth = depthPoint === null ? 'no depth stated' : `depth ${numberText(depthPoint, 1)}`;
      const seen =
        completeness === null ? reason || 'not testable' : `seen with a chance of ${probabilityText(completeness)}`;
      return `${band}: ${expected}, ${depth}, ${seen}`;
    })
    .join('; ');
}

/**
 * Limits chart: per band the ordinary counterpart that this much gas should have (bar of 1 sigma, line of 2) against the
 * depth here, for a point and for galaxies of several effective radii; on the right the chance that it would be seen.
 *
 * @returns a whole SVG document
 */
export function limitsChartSvg({ detail }: Pick<DrawnEvidence, 'detail'>, options: LimitsOptions = {}): string {
  const { width = 460, theme = PAPER } = options;
  const { limits } = detail;
  const height = TOP + Math.max(1, limits.length) * ROW + BOTTOM;
  const [from, to] = span(limits);
  const x = (magnitude: number) =>
    LEFT + Math.min(1, Math.max(0, (magnitude - from) / (to - from))) * (width - LEFT - RIGHT);
  const floor = height - BOTTOM;
  const small = { 'font-size': 11, 'font-family': theme.mono, fill: theme.muted };
  const step = roundStep(to - from, 5);
  const ticks: number[] = [];
  for (let m = Math.ceil(from / step) * step; m <= to + 1e-9; m += step) ticks.push(m);
  return element(
    'svg',
    {
      xmlns: 'http://www.w3.org/2000/svg',
      width,
      height,
      viewBox: `0 0 ${width} ${height}`,
      role: 'img',
      'aria-label': `What silence is worth. ${limitsSummary(limits)}`,
    },
    element('rect', { width, height, fill: theme.field }),
    ...ticks.map(
      (m) =>
        element('path', { d: `M${px(x(m))} ${TOP - 6}V${floor}`, stroke: theme.line, 'stroke-dasharray': '2 4' }) +
        textAt(x(m), floor + 14, String(Number(m.toFixed(2))), { ...small, 'text-anchor': 'middle' }),
    ),
    textAt(LEFT, height - 4, 'apparent magnitude, fainter to the right', { ...small, 'font-family': theme.prose }),
    textAt(width - 6, height - 4, 'would be seen', { ...small, 'font-family': theme.prose, 'text-anchor': 'end' }),
    ...limits.map((limit, i) => bandRow(limit, TOP + i * ROW + ROW / 2, x, width, theme)),
  );
}

/** A name that fits beside its row. */
const shortened = (name: string): string => (name.length > LONGEST_NAME ? `${name.slice(0, LONGEST_NAME - 1)}…` : name);

/** Magnitudes shown: all expectations to two sigma and all depths, with a margin. */
function span(limits: readonly BandLimit[]): [number, number] {
  const values = limits.flatMap(({ expectedMagnitude, expectedScatterMag, depthPoint, depthExtended }) => [
    ...(expectedMagnitude === null
      ? []
      : [expectedMagnitude - 2 * (expectedScatterMag ?? 0), expectedMagnitude + 2 * (expectedScatterMag ?? 0)]),
    ...(depthPoint === null ? [] : [depthPoint + 0.5]),
    ...depthExtended.map(({ magnitude }) => magnitude),
  ]);
  if (values.length === 0) return [14, 26];
  return [Math.min(...values) - 0.3, Math.max(...values) + 0.3];
}

function bandRow(
  limit: BandLimit,
  y: number,
  x: (magnitude: number) => number,
  width: number,
  theme: DrawingTheme,
): string {
  const { band, system, expectedMagnitude: expected, expectedScatterMag: scatter, depthPoint, completeness } = limit;
  const tone = limit.testable ? theme.amber : theme.muted;
  const parts = [
    textAt(LEFT - 10, y + 12, shortened(limit.catalogueName), {
      'font-size': 9.5,
      'font-family': theme.prose,
      'text-anchor': 'end',
      fill: theme.muted,
    }),
    textAt(LEFT - 10, y - 1, `${band} ${system}`, {
      'font-size': 12,
      'font-family': theme.mono,
      'text-anchor': 'end',
      fill: theme.text,
    }),
    element('path', { d: `M${LEFT} ${y}H${width - RIGHT}`, stroke: theme.line }),
  ];
  if (depthPoint !== null) {
    // Beyond the depth for a point nothing of any size is seen.
    parts.push(
      element('rect', {
        x: x(depthPoint),
        y: y - 12,
        width: Math.max(0, width - RIGHT - x(depthPoint)),
        height: 24,
        fill: theme.hatch,
        'fill-opacity': 0.45,
      }),
      element('path', { d: `M${px(x(depthPoint))} ${y - 12}v24`, stroke: theme.text, 'stroke-width': 1.6 }),
    );
  }
  limit.depthExtended.forEach(({ radiusArcsec, magnitude }, i, all) => {
    parts.push(element('path', { d: `M${px(x(magnitude))} ${y - 9}v18`, stroke: theme.muted }));
    const crowded = i > 0 && i < all.length - 1;
    if (!crowded)
      parts.push(
        textAt(x(magnitude), y - 11, `${radiusArcsec}″`, {
          'font-size': 9.5,
          'font-family': theme.mono,
          'text-anchor': 'middle',
          fill: theme.muted,
        }),
      );
  });
  if (expected !== null) {
    const s = scatter ?? 0;
    const [low, high] = [x(expected - s), x(expected + s)];
    parts.push(
      element('path', {
        d: `M${px(x(expected - 2 * s))} ${y}H${px(x(expected + 2 * s))}`,
        stroke: tone,
        'stroke-width': 1.4,
      }),
      element('rect', {
        x: low,
        y: y - 4,
        width: Math.max(1, high - low),
        height: 8,
        fill: tone,
        'fill-opacity': 0.45,
      }),
      element('circle', { cx: x(expected), cy: y, r: 3.6, fill: tone }),
    );
  }
  parts.push(
    textAt(width - 6, y + 4, completeness === null ? 'not testable' : probabilityText(completeness), {
      'font-size': completeness === null ? 10.5 : 12,
      'font-family': completeness === null ? theme.prose : theme.mono,
      'text-anchor': 'end',
      fill: completeness === null ? theme.muted : theme.text,
    }),
  );
  return element('g', {}, ...parts);
}
