import type { PlotPoint } from '@eremite/shared/contracts/plot';
import type { DrawingTheme } from '@eremite/shared/drawing/drawing-theme';

/** What is drawn of the criteria of the run. */
export interface ChartContext {
  massToLightR: number;
  /** Least P(none) + P(missed) for dark, and least P(no neighbour) for alone. */
  darkFrom: number;
  aloneFrom: number;
}

export interface ChartOptions extends ChartContext {
  points: readonly PlotPoint[];
  /** Ids of the detections inside the brush; null where nothing is brushed. */
  lit: ReadonlySet<string> | null;
  theme: DrawingTheme;
  width: number;
  height: number;
}

/** An axis of a chart: how a point's value is got, and what brush limits are called. */
export interface ChartAxis {
  label: string;
  /** Value on the scale of the axis; null where the point has none. */
  value: (point: PlotPoint) => number | null;
  /** What the value is written as, and read back from. */
  toText: (value: number) => string;
  fromText: (text: string) => number;
}

/** One plot of the survey. */
export interface Chart {
  id: 'verdicts' | 'tully-fisher' | 'gas-to-light';
  title: string;
  /** What is drawn, with the sources of its lines. */
  caption: string;
  x: ChartAxis;
  y: ChartAxis;
  draw: (options: ChartOptions) => (SVGSVGElement | HTMLElement) & { scale: (name: 'x' | 'y') => ChartScale };
}

/** What of a drawn scale the brush needs. */
export interface ChartScale {
  invert?: (pixel: number) => number;
  apply: (value: number) => number;
  range?: Iterable<number>;
}

const plain = {
  toText: (value: number) => value.toFixed(2),
  fromText: Number,
};

export const plainAxis = (label: string, value: ChartAxis['value']): ChartAxis => ({ label, value, ...plain });
