export interface Tick {
  /** Place along the side, pixels from its start. */
  at: number;
  text: string;
}

const STEPS = [1, 2, 5, 10];

/** The round step (1, 2 or 5 times a power of ten) that comes nearest to `wanted` ticks over a span. */
export function roundStep(span: number, wanted: number): number {
  const rough = span / wanted;
  const power = 10 ** Math.floor(Math.log10(rough));
  const off = (step: number) => Math.abs(Math.log((step * power) / rough));
  return STEPS.reduce((best, step) => (off(step) < off(best) ? step : best)) * power;
}

const tidy = (value: number): string => String(Number(value.toPrecision(6)));

/**
 * Ticks of one side of the frame, counted from the detection outwards on both sides.
 *
 * @param centre value at the middle of the side, in the ruler's unit
 * @param span length of the side, in the ruler's unit
 * @param pixels length of the side, pixels
 * @param unit what is written behind the outermost value
 */
export function rulerTicks(centre: number, span: number, pixels: number, unit: string, wanted = 5): Tick[] {
  if (!(span > 0) || !Number.isFinite(span) || pixels <= 0) return [];
  const step = roundStep(span, wanted);
  const ticks: Tick[] = [];
  const first = Math.ceil((centre - span / 2) / step);
  const last = Math.floor((centre + span / 2) / step);
  for (let i = first; i <= last; i++) {
    const at = ((i * step - centre) / span + 0.5) * pixels;
    ticks.push({ at, text: i === 0 ? '0' : `${tidy(Math.abs(i * step))}${unit}` });
  }
  return ticks;
}
