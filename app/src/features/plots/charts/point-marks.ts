import type { PlotPoint } from '@eremite/shared/contracts/plot';
import * as Plot from '@observablehq/plot';
import type { ChartOptions } from './chart.ts';
import { colourOf, VERDICT_SYMBOLS } from './verdict-symbols.ts';

type Value = (point: PlotPoint) => number | null;

/** How strongly a point is drawn: outside the brush it fades. */
export const opacityIn =
  ({ lit }: Pick<ChartOptions, 'lit'>) =>
  ({ detectionId }: PlotPoint): number =>
    lit === null || lit.has(detectionId) ? 0.9 : 0.12;

/** Points by verdict, the rare ones on top; outside the brush they fade. */
export function pointMarks({ points, lit, theme }: ChartOptions, x: Value, y: Value): Plot.Markish[] {
  return VERDICT_SYMBOLS.map(([verdict, symbol]) => {
    const own = points.filter((point) => point.starlight === verdict && x(point) !== null && y(point) !== null);
    const colour = colourOf(symbol, theme);
    return Plot.dot(own, {
      x,
      y,
      r: symbol.radius,
      symbol: symbol.symbol,
      stroke: colour,
      strokeWidth: symbol.filled ? 0 : 1.5,
      fill: symbol.filled ? colour : 'none',
      opacity: opacityIn({ lit }),
      title: (point: PlotPoint) => `${point.name}: ${point.starlight}, ${point.surroundings}`,
    });
  });
}

/** Error bars along one axis; drawn faintly for what is plainly starlit, which are many. */
export function errorMarks(
  { points, lit, theme }: ChartOptions,
  along: 'x' | 'y',
  place: Value,
  from: Value,
  to: Value,
): Plot.Markish {
  const own = points.filter((point) => place(point) !== null && from(point) !== null && to(point) !== null);
  const faint = (point: PlotPoint) => (lit !== null && !lit.has(point.detectionId)) || point.starlight === 'starlit';
  const channels = { stroke: theme.muted, strokeWidth: 0.8, strokeOpacity: (p: PlotPoint) => (faint(p) ? 0.12 : 0.6) };
  return along === 'x'
    ? Plot.ruleY(own, { y: place, x1: from, x2: to, ...channels })
    : Plot.ruleX(own, { x: place, y1: from, y2: to, ...channels });
}

/** Look and axes that all plots share. */
export function frame({ theme, width, height }: ChartOptions): Plot.PlotOptions {
  return {
    width,
    height,
    marginLeft: 54,
    marginBottom: 44,
    marginTop: 26,
    marginRight: 18,
    style: {
      background: theme.field,
      color: theme.muted,
      fontFamily: theme.mono,
      fontSize: '11px',
      overflow: 'visible',
    },
  };
}
