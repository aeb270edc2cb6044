import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { randomStream } from '../robustness/random.ts';
import { takeOffBaseline } from './baseline.ts';
import { correlatedNoise, correlationOf } from './channel-noise.ts';
import { leastSquares } from './least-squares.ts';
import { busyLine, gaussianLine } from './line-shapes.ts';
import { lineWidth, peaksOf } from './line-widths.ts';
import { measureLine } from './measure-line.ts';

const V = Float64Array.from({ length: 200 }, (_, i) => 1500 + 5 * i);
const noisy = (shape: (v: number) => number, sigma: number, key = 'noise') => {
  const random = randomStream(3, key);
  return V.map((v) => shape(v) + sigma * random.gaussian());
};
const gaussian = (v: number) => gaussianLine(v, { peak: 10, centreKms: 2000, sigmaKms: 40 });

describe('lineWidth', () => {
  it('of a Gaussian without noise is 2.3548 and 3.5882 sigma', () => {
    const grid = Float64Array.from({ length: 4001 }, (_, i) => 1800 + i / 10);
    const values = grid.map(gaussian);
    const of = (fraction: number) => {
      const { lowKms, highKms } = lineWidth(grid, values, fraction, peaksOf(values))!;
      return highKms - lowKms;
    };
    expect(of(0.5)).toBeCloseTo(40 * 2 * Math.sqrt(2 * Math.LN2), 2);
    expect(of(0.2)).toBeCloseTo(40 * 2 * Math.sqrt(2 * Math.log(5)), 2);
  });

  it('measures each flank of two horns against its own peak', () => {
    const grid = [0, 1, 2, 3, 4, 5, 6];
    const values = [0, 10, 2, 1, 2, 4, 0];
    expect(lineWidth(grid, values, 0.5, peaksOf(values))).toEqual({ lowKms: 0.5, highKms: 5.5 });
  });

  it('is undefined where the line runs out of the spectrum', () => {
    expect(lineWidth([0, 1, 2], [9, 10, 9], 0.5, { low: 1, high: 1 })).toBeUndefined();
  });

  it('takes no ripple for a second peak, and no vanishing tail', () => {
    expect(peaksOf([0, 5e-324, 5e-324, 1, 10, 1, 1.5, 0])).toEqual({ low: 4, high: 4 });
  });
});

describe('busyLine', () => {
  it('between steep flanks is the level, and four times nothing beyond them', () => {
    const line = { level: 3, steepness: 1, centreKms: 0, halfWidthKms: 50, troughKms: 0, curvature: 0 };
    expect(busyLine(0, line)).toBeCloseTo(3, 9);
    expect(busyLine(50, line)).toBeCloseTo(1.5, 9);
    expect(busyLine(60, line)).toBeCloseTo(0, 9);
    expect(busyLine(10, { ...line, curvature: 0.01 })).toBeCloseTo(6, 9);
  });
});

describe('leastSquares', () => {
  it('finds the straight line of the normal equations', () => {
    const x = [0, 1, 2, 3];
    const y = [1, 3, 4, 8];
    const model = (at: number, [a, b]: readonly number[]) => a! + b! * at;
    const { parameters, chiSquared } = leastSquares({ x, y, sigma: 1, model, start: [0, 0], steps: [1e-6, 1e-6] });
    // By hand: slope 11/5, intercept 0.7, residuals 0.3, 0.1, -1.1, 0.7.
    expect(parameters[0]).toBeCloseTo(0.7, 5);
    expect(parameters[1]).toBeCloseTo(2.2, 5);
    expect(chiSquared).toBeCloseTo(1.8, 6);
  });
});

describe('takeOffBaseline', () => {
  it('takes a slope off, and neither the line nor a spike bends it', () => {
    const flux = noisy((v) => gaussian(v) + 2 + 0.01 * (v - 2000), 0.5);
    flux[10] = 400;
    const { flux: flat, noise } = takeOffBaseline(V, flux, { lowKms: 1840, highKms: 2160 });
    expect(noise).toBeGreaterThan(0.4);
    expect(noise).toBeLessThan(0.6);
    expect(Math.abs(flat[199]!)).toBeLessThan(2);
    expect(flat[100]).toBeGreaterThan(8);
  });

  it('refuses a line that leaves no channels', () => {
    expect(() => takeOffBaseline(V, V, { lowKms: 0, highKms: 9999 })).toThrow(DomainError);
  });
});

describe('correlationOf', () => {
  it('finds the correlation of smoothed noise and none in white noise', () => {
    const long = Float64Array.from({ length: 2000 }, (_, i) => i);
    const nowhere = { lowKms: -2, highKms: -1 };
    const random = randomStream(1, 'correlation');
    expect(correlationOf(long, correlatedNoise(2000, 2, 0.6, random), nowhere)).toBeCloseTo(0.6, 1);
    expect(correlationOf(long, correlatedNoise(2000, 2, 0, random), nowhere)).toBeLessThan(0.08);
  });
});

describe('measureLine', () => {
  it('gives centre, widths and flux of a Gaussian within three of its errors', () => {
    const found = measureLine(V, noisy(gaussian, 0.5), { centreKms: 2010, widthKms: 80 });
    const within = (measured: { value: number; error: number }, truth: number) =>
      expect(Math.abs(measured.value - truth) / measured.error).toBeLessThan(3);
    within(found.centreKms, 2000);
    within(found.w50Kms, 94.19);
    within(found.w20Kms, 143.53);
    within(found.flux, 10 * 40 * Math.sqrt(2 * Math.PI));
    within(found.asymmetry, 0);
    expect(found.peaks).toBe('one');
    expect(found.peakSignalToNoise).toBeGreaterThan(15);
  });

  it('finds a line without being told where it is', () => {
    const found = measureLine(V, noisy(gaussian, 0.5));
    expect(Math.abs(found.centreKms.value - 2000)).toBeLessThan(6);
  });

  it('gives the same numbers for the same seed', () => {
    const flux = noisy(gaussian, 1);
    const settings = { centreKms: 2000, widthKms: 90, draws: 20, seed: 7 };
    expect(measureLine(V, flux, settings).w50Kms).toEqual(measureLine(V, flux, settings).w50Kms);
    expect(measureLine(V, flux, { ...settings, seed: 8 }).w50Kms.error).not.toBe(
      measureLine(V, flux, settings).w50Kms.error,
    );
  });

  it('sees which side of a lopsided line is stronger', () => {
    const horns = { level: 5, steepness: 0.1, centreKms: 2000, halfWidthKms: 100, troughKms: 1975, curvature: 1e-4 };
    const { asymmetry } = measureLine(
      V,
      noisy((v) => busyLine(v, horns), 0.3),
      { centreKms: 2000, widthKms: 200 },
    );
    expect(asymmetry.value).toBeGreaterThan(3 * asymmetry.error);
  });

  it('leaves channels without a value out', () => {
    const flux = noisy(gaussian, 0.5);
    flux.fill(NaN, 20, 40);
    flux[101] = NaN;
    expect(Math.abs(measureLine(V, flux, { centreKms: 2000, widthKms: 90 }).w50Kms.value - 94)).toBeLessThan(8);
  });

  it('refuses a spectrum of too few channels and one without noise', () => {
    expect(() => measureLine(V.slice(0, 10), V.slice(0, 10))).toThrow(/too few/);
    expect(() => measureLine(V, new Float64Array(200))).toThrow(DomainError);
  });
});
