import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { areaUnderCurve, calibrationBins } from './calibration.ts';
import { Random } from './random.ts';

describe('calibration', () => {
  it('of true probabilities lies on the diagonal within its intervals', () => {
    const random = new Random(77);
    const claimed = Array.from({ length: 20_000 }, () => random.uniform());
    const truth = claimed.map((p) => random.uniform() < p);
    const bins = calibrationBins(claimed, truth, 10, 0.999);
    expect(bins.reduce((sum, { count }) => sum + count, 0)).toBe(20_000);
    for (const { claimed: mean, interval } of bins) {
      expect(interval.low).toBeLessThan(mean);
      expect(interval.high).toBeGreaterThan(mean);
    }
  });

  it('of overbold probabilities leaves it', () => {
    const random = new Random(78);
    const truth = Array.from({ length: 5000 }, () => random.uniform() < 0.6);
    const [bin] = calibrationBins(
      truth.map(() => 0.95),
      truth,
    ).slice(-1);
    expect(bin!.interval.high).toBeLessThan(0.95);
  });

  it('puts 1 in the last bin and leaves empty bins empty', () => {
    const bins = calibrationBins([1, 0], [true, false]);
    expect(bins[9]).toMatchObject({ count: 1, claimed: 1, found: 1 });
    expect(bins[5]).toMatchObject({ count: 0, interval: { low: 0, high: 1 } });
    expect(() => calibrationBins([1.2], [true])).toThrow(DomainError);
    expect(() => calibrationBins([0.2], [])).toThrow(DomainError);
  });
});

describe('area under the curve', () => {
  it('is 1 for perfect order, 0 for the reverse, half for ties', () => {
    expect(areaUnderCurve([1, 2, 3, 4], [false, false, true, true])).toBe(1);
    expect(areaUnderCurve([4, 3, 2, 1], [false, false, true, true])).toBe(0);
    expect(areaUnderCurve([1, 1, 1, 1], [false, true, false, true])).toBe(0.5);
    expect(areaUnderCurve([1, 2], [true, true])).toBeNaN();
  });

  it('equals the share of pairs in order, counted one by one', () => {
    const random = new Random(9);
    const score = Array.from({ length: 300 }, () => Math.floor(20 * random.uniform()));
    const truth = score.map((s) => random.uniform() < s / 25);
    let wins = 0;
    let pairs = 0;
    for (let i = 0; i < 300; i++) {
      for (let j = 0; j < 300; j++) {
        if (!truth[i] || truth[j]) continue;
        pairs++;
        wins += score[i]! > score[j]! ? 1 : score[i] === score[j] ? 0.5 : 0;
      }
    }
    expect(areaUnderCurve(score, truth)).toBeCloseTo(wins / pairs, 12);
    expect(() => areaUnderCurve([NaN], [true])).toThrow(DomainError);
  });
});
