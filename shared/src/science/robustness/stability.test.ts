import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { normalCdf } from './error-function.ts';
import { NO_CHANGE, USUAL_ERRORS, drawPerturbation, onlyChanged } from './perturbation.ts';
import { Random, randomStream } from './random.ts';
import { flips, stability } from './stability.ts';
import { truncatedNormal } from './truncated-normal.ts';

const errors = { ...USUAL_ERRORS, distanceMpc: 28, distanceErrorMpc: 2.858035574820365, fluxFraction: 0.1 };

describe('truncated normal deviate', () => {
  it('has the mean of the truncated distribution', () => {
    // mean + sigma phi(a) / (1 - Phi(a)), a = (least - mean) / sigma: textbook identity
    const random = new Random(1);
    const values = Array.from({ length: 50_000 }, () => truncatedNormal(random, 2, 1.5, 0.1));
    const a = (0.1 - 2) / 1.5;
    const expected = 2 + (1.5 * Math.exp(-0.5 * a * a)) / Math.sqrt(2 * Math.PI) / (1 - normalCdf(a));
    expect(Math.min(...values)).toBeGreaterThanOrEqual(0.1);
    expect(Math.abs(values.reduce((s, x) => s + x, 0) / values.length - expected)).toBeLessThan(0.03);
    expect(values.filter((x) => x === 0.1)).toHaveLength(0);
  });

  it('uses one deviate whatever its width, and refuses a mean below the limit', () => {
    const wide = new Random(4);
    const fixed = new Random(4);
    truncatedNormal(wide, 5, 2, 0);
    expect(truncatedNormal(fixed, 5, 0, 0)).toBe(5);
    expect(wide.uniform()).toBe(fixed.uniform());
    expect(() => truncatedNormal(wide, 0, 1, 0.1)).toThrow(DomainError);
  });
});

describe('a draw', () => {
  it('repeats with its seed and stays in step when an error is set to zero', () => {
    const one = drawPerturbation(randomStream(1, 'row 7'), errors);
    expect(drawPerturbation(randomStream(1, 'row 7'), errors)).toEqual(one);
    const without = drawPerturbation(randomStream(1, 'row 7'), { ...errors, distanceErrorMpc: 0 });
    expect(without).toEqual({ ...one, distanceFactor: 1 });
  });

  it('has the scatter asked for', () => {
    const random = new Random(12);
    const draws = Array.from({ length: 20_000 }, () => drawPerturbation(random, errors));
    const spread = (values: number[]) => {
      const mean = values.reduce((s, x) => s + x, 0) / values.length;
      return Math.sqrt(values.reduce((s, x) => s + (x - mean) ** 2, 0) / values.length);
    };
    expect(spread(draws.map((d) => d.distanceFactor)) / (errors.distanceErrorMpc / 28)).toBeCloseTo(1, 1);
    expect(spread(draws.map((d) => d.fluxFactor)) / Math.hypot(0.1, 0.1)).toBeCloseTo(1, 1);
    expect(spread(draws.map((d) => Math.log10(d.massToLightFactor))) / 0.3).toBeCloseTo(1, 1);
    expect(spread(draws.map((d) => d.depthShiftMag)) / 0.15).toBeCloseTo(1, 1);
  });

  it('leaves a distance that is not usable alone, and can change one input only', () => {
    const draw = drawPerturbation(new Random(3), { ...errors, distanceMpc: NaN, distanceErrorMpc: NaN });
    expect(draw.distanceFactor).toBe(1);
    expect(Object.values(draw).every(Number.isFinite)).toBe(true);
    expect(onlyChanged(draw, 'fluxFactor')).toEqual({ ...NO_CHANGE, fluxFactor: draw.fluxFactor });
  });
});

describe('stability', () => {
  // A neighbour 2 degrees away, criterion 1 Mpc, D = 28 +- 2.858 Mpc: P(inside) = 0.5896678 (Gaussian)
  const accompanied = (mpc: number) => (mpc * 2 * DEGREE <= 1 ? 'accompanied' : 'alone');

  it('of a verdict at the edge is near a half and takes more draws where the cut is there', () => {
    const run = (cut: number) => {
      const random = randomStream(5, 'edge');
      return stability('accompanied', () => accompanied(28 * drawPerturbation(random, errors).distanceFactor), { cut });
    };
    const far = run(0.9);
    expect(far.draws).toBe(2000);
    // 3.5 standard errors of 2000 draws; over 300 seeds the mean was 0.5903 and the scatter binomial.
    expect(Math.abs(far.agreement - 0.5896678)).toBeLessThan(0.0385);
    expect(far.interval.high - far.interval.low).toBeCloseTo(2 * 1.96 * 0.011, 2);
    expect(run(far.agreement).draws).toBeGreaterThan(2000);
    expect(stability('even', (k) => (k % 2 ? 'odd' : 'even'), { cut: 0.5 }).draws).toBe(10_000);
    expect(run(0.9)).toEqual(far);
    expect((far.counts.get('accompanied') ?? 0) + (far.counts.get('alone') ?? 0)).toBe(2000);
  });

  it('of a verdict that never changes is not proven: the interval stays below one', () => {
    const { agreement, interval } = stability('dark', () => 'dark', { draws: 200 });
    expect(agreement).toBe(1);
    expect(interval.low).toBeLessThan(0.99);
    expect(() => stability('dark', () => 'dark', { draws: 0 })).toThrow(DomainError);
  });

  it('names the distance that flips a verdict', () => {
    const { below, above } = flips(28, { low: 10, high: 40 }, accompanied);
    expect(below).toBeUndefined();
    expect(above?.verdict).toBe('alone');
    expect(Math.abs(above!.value - 1 / (2 * DEGREE))).toBeLessThan(0.001);
    expect(flips(28, { low: 28, high: 28 }, accompanied)).toEqual({});
    expect(() => flips(5, { low: 10, high: 40 }, accompanied)).toThrow(DomainError);
  });
});
