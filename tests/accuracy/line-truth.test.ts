import { randomStream } from '@eremite/shared/science/robustness/random';
import { busyLine, gaussianLine } from '@eremite/shared/science/spectrum/line-shapes';
import { lineWidth, peaksOf } from '@eremite/shared/science/spectrum/line-widths';
import { measureLine } from '@eremite/shared/science/spectrum/measure-line';
import { describe, expect, it } from 'vitest';

/** Lines of known truth, each in many noise realisations: what the measurement makes of them. */
const CHANNEL = 5;
const REALISATIONS = 30;
const V = Float64Array.from({ length: 300 }, (_, i) => 1250 + CHANNEL * i);
const gaussian = (w50: number) => (v: number) => gaussianLine(v, { peak: 1, centreKms: 2003, sigmaKms: w50 / 2.35482 });
const horned = (width: number, skew: number) => (v: number) =>
  busyLine(v, {
    level: 0.45,
    steepness: 0.09,
    centreKms: 2003,
    halfWidthKms: width / 2,
    troughKms: 2003 + skew * width,
    curvature: 1.8 / (width / 2) ** 2,
  });
const LINES: [name: string, peaks: 'one' | 'two', shape: (v: number) => number][] = [
  ['Gaussian, W50 30', 'one', gaussian(30)],
  ['Gaussian, W50 60', 'one', gaussian(60)],
  ['Gaussian, W50 150', 'one', gaussian(150)],
  ['horned, 120 wide', 'two', horned(120, 0)],
  ['horned, 250 wide', 'two', horned(250, 0)],
  ['horned, 250 wide, lopsided', 'two', horned(250, -0.08)],
];

/** Width and flux of a shape without noise. */
function truthOf(shape: (v: number) => number) {
  const fine = Float64Array.from({ length: 15_000 }, (_, i) => 1250 + i / 10);
  const values = fine.map(shape);
  const width = lineWidth(fine, values, 0.5, peaksOf(values))!;
  return {
    w50: width.highKms - width.lowKms,
    flux: values.reduce((sum, value) => sum + value / 10, 0),
    peak: Math.max(...values),
  };
}

function outcome(shape: (v: number) => number, signalToNoise: number, name: string) {
  const truth = truthOf(shape);
  const noise = truth.peak / signalToNoise;
  const random = randomStream(5, `${name} ${signalToNoise}`);
  const runs = Array.from({ length: REALISATIONS }, () => {
    const flux = V.map((v) => shape(v) + 0.3 + 2e-4 * (v - 2000) + noise * random.gaussian());
    return measureLine(V, flux, { centreKms: 2000, widthKms: truth.w50, draws: 10 });
  });
  const mean = (values: number[]) => values.reduce((a, b) => a + b, 0) / values.length;
  const middle = (values: number[]) => [...values].sort((a, b) => a - b)[values.length >> 1]!;
  const share = (peaks: string) => runs.filter((run) => run.peaks === peaks).length / runs.length;
  const w50 = runs.map((run) => run.w50Kms.value - truth.w50);
  const flux = runs.map((run) => run.flux.value / truth.flux - 1);
  // Scatter as 1.4826 times the median absolute deviation: one failed fit is told by its own count.
  const scatter = (values: number[]) => 1.4826 * middle(values.map((value) => Math.abs(value - middle(values))));
  return {
    w50Bias: middle(w50),
    w50Scatter: scatter(w50),
    w50Error: middle(runs.map((run) => run.w50Kms.error)),
    fluxBias: mean(flux),
    fluxScatter: scatter(flux),
    fluxError: middle(runs.map((run) => run.flux.error)) / truth.flux,
    wild: w50.filter((off) => Math.abs(off) > 0.3 * truth.w50).length / runs.length,
    one: share('one'),
    two: share('two'),
  };
}

describe('measureLine on lines of known truth', () => {
  const rows: string[] = [];
  it.each(LINES.flatMap((line) => [5, 10, 20, 50].map((sn) => [...line, sn] as const)))(
    '%s is measured without bias (case %#)',
    (name, peaks, shape, signalToNoise) => {
      const found = outcome(shape, signalToNoise, name);
      const number = (value: number, digits = 1) => value.toFixed(digits).padStart(7);
      rows.push(
        `${name.padEnd(28)}${String(signalToNoise).padStart(4)}` +
          [found.w50Bias, found.w50Scatter, found.w50Error].map((value) => number(value)).join('') +
          [found.fluxBias, found.fluxScatter, found.fluxError, found.wild, found.one, found.two]
            .map((value) => number(100 * value))
            .join(''),
      );
      const { w50 } = truthOf(shape);
      const isStrong = signalToNoise >= 10;
      // Medians of thirty scatter by about a fourth of the scatter of one.
      expect(Math.abs(found.w50Bias)).toBeLessThan(0.7 * found.w50Scatter + 0.005 * w50);
      expect(Math.abs(found.fluxBias)).toBeLessThan(0.7 * found.fluxScatter + 0.01);
      expect(found.w50Error / found.w50Scatter).toBeGreaterThan(0.4);
      expect(found.w50Error / found.w50Scatter).toBeLessThan(2.5);
      expect(found.wild).toBeLessThan(isStrong ? 0.01 : 0.11);
      expect(peaks === 'one' ? found.two : found.one).toBeLessThan(isStrong ? 0.04 : 0.11);
    },
  );

  it('was shown all cases', () => {
    if (process.env['EREMITE_SHOW_TABLES']) console.log(rows.join('\n'));
    expect(rows).toHaveLength(LINES.length * 4);
  });
});
