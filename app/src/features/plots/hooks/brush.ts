import type { PlotPoint } from '@eremite/shared/contracts/plot';
import type { Chart } from '../charts/chart.ts';

/** A rectangle on a plot, in the values of its axes. */
export interface Brush {
  chart: Chart['id'];
  x: [number, number];
  y: [number, number];
}

const ordered = ([a, b]: readonly [number, number]): [number, number] => (a <= b ? [a, b] : [b, a]);

/** The brush in the address: `gas-to-light:7.1,9,0.5,2`; three decimals are finer than a pixel. */
export const brushToText = ({ chart, x, y }: Brush): string =>
  `${chart}:${[...ordered(x), ...ordered(y)].map((value) => Number(value.toFixed(3))).join(',')}`;

/** Reads it back; null for what is not one. */
export function brushFromText(text: string | null, charts: readonly Pick<Chart, 'id'>[]): Brush | null {
  const [id, numbers = ''] = text?.split(':') ?? [];
  const chart = charts.find((one) => one.id === id)?.id;
  const [x1, x2, y1, y2] = numbers.split(',').map(Number);
  if (!chart || ![x1, x2, y1, y2].every(Number.isFinite)) return null;
  return { chart, x: ordered([x1!, x2!]), y: ordered([y1!, y2!]) };
}

/** The points inside the brush, edges included; a point without a value on an axis is never inside. */
export function brushed(points: readonly PlotPoint[], brush: Brush, { x, y }: Pick<Chart, 'x' | 'y'>): PlotPoint[] {
  const within = (value: number | null, [low, high]: [number, number]) =>
    value !== null && value >= low && value <= high;
  return points.filter((point) => within(x.value(point), brush.x) && within(y.value(point), brush.y));
}
