import type { SpectrumChannels } from '@eremite/shared/contracts/observation';
import { roundStep } from '@eremite/shared/drawing/ruler';

export interface PlotFrame {
  width: number;
  height: number;
  left: number;
  bottom: number;
  top: number;
  right: number;
}

export interface SpectrumLayout {
  x: (v: number) => number;
  y: (flux: number) => number;
  lowKms: number;
  highKms: number;
  /** Channels as steps; broken where one has no value. */
  steps: string;
  fit: string | null;
  xTicks: number[];
  yTicks: number[];
}

/** Where channels, fit and ticks of a spectrum lie in its plot, pixels. */
export function spectrumLayout({ czKms, flux, fit }: SpectrumChannels, frame: PlotFrame): SpectrumLayout {
  const [lowKms, highKms] = [czKms[0]!, czKms.at(-1)!];
  const known = flux.filter((value): value is number => value !== null);
  const top = Math.max(...known, ...(fit ?? []));
  const bottom = Math.min(0, ...known);
  const margin = 0.08 * (top - bottom) || 1;
  const [floor, ceiling] = [bottom - margin, top + margin];
  const inner = { w: frame.width - frame.left - frame.right, h: frame.height - frame.top - frame.bottom };
  const x = (v: number) => frame.left + ((v - lowKms) / (highKms - lowKms)) * inner.w;
  const y = (value: number) => frame.top + ((ceiling - value) / (ceiling - floor)) * inner.h;
  const edge = (i: number) => (i <= 0 ? lowKms : i >= czKms.length ? highKms : (czKms[i - 1]! + czKms[i]!) / 2);
  let steps = '';
  let isOpen = false;
  const at = (n: number) => n.toFixed(1);
  for (const [i, value] of flux.entries()) {
    if (value === null) {
      isOpen = false;
      continue;
    }
    steps += `${isOpen ? 'L' : 'M'}${at(x(edge(i)))} ${at(y(value))}H${at(x(edge(i + 1)))}`;
    isOpen = true;
  }
  const line = fit && fit.map((value, i) => `${i === 0 ? 'M' : 'L'}${at(x(czKms[i]!))} ${at(y(value))}`).join('');
  return {
    x,
    y,
    lowKms,
    highKms,
    steps,
    fit: line,
    xTicks: ticks(lowKms, highKms, 6),
    yTicks: ticks(floor, ceiling, 4),
  };
}

function ticks(low: number, high: number, wanted: number): number[] {
  const step = roundStep(high - low, wanted);
  const first = Math.ceil(low / step);
  const count = Math.floor(high / step) - first + 1;
  return Array.from({ length: count }, (_, i) => (first + i) * step);
}
