import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { expectedCounterpart } from '../hydrogen/expected-counterpart.ts';
import { DEFAULT_DETECTION, detectionProbability, expectedDetection } from './completeness.ts';
import { extendedLimit } from './extended-depth.ts';

const depth = { limitMag: 22.7, fwhmArcsec: 1.3 };
const magnitudes = { magnitudeAb: 18.5, scatterMag: 1.6, tailFraction: 0.05, tailScatterMag: 3.2 };
const sizes = [
  { weight: 0.85, median: 6, scatterDex: 0.2 },
  { weight: 0.15, median: 15, scatterDex: 0.25 },
];

describe('detection probability', () => {
  it('is half the ceiling at the extended-source limit', () => {
    const limit = extendedLimit(depth, 8, DEFAULT_DETECTION.penaltyMag);
    expect(detectionProbability(limit, 8, depth)).toBeCloseTo(0.5 * DEFAULT_DETECTION.ceiling, 12);
  });

  it('falls with magnitude and with size', () => {
    expect(detectionProbability(18, 8, depth)).toBeGreaterThan(detectionProbability(19.5, 8, depth));
    expect(detectionProbability(19, 5, depth)).toBeGreaterThan(detectionProbability(19, 20, depth));
  });

  it('of the expected counterpart equals a fine sum over magnitude and size', () => {
    // Independent brute force: midpoint sums of the same distributions, 400 x 400 points.
    const gauss = (x: number) => Math.exp(-0.5 * x * x) / Math.sqrt(2 * Math.PI);
    const steps = Array.from({ length: 400 }, (_, k) => -6 + (k + 0.5) * 0.03);
    let sum = 0;
    for (const { weight, median, scatterDex } of sizes) {
      for (const s of steps) {
        for (const t of steps) {
          const radius = median * 10 ** (scatterDex * s);
          const core = detectionProbability(magnitudes.magnitudeAb + magnitudes.scatterMag * t, radius, depth);
          const tail = detectionProbability(magnitudes.magnitudeAb + magnitudes.tailScatterMag * t, radius, depth);
          sum += weight * gauss(s) * gauss(t) * 0.03 ** 2 * (0.95 * core + 0.05 * tail);
        }
      }
    }
    expect(Math.abs(expectedDetection(magnitudes, sizes, depth) - sum)).toBeLessThan(1e-3);
  });

  it('approaches the ceiling for a bright galaxy in deep data and zero in shallow', () => {
    const bright = { magnitudeAb: 12, scatterMag: 1, tailFraction: 0, tailScatterMag: 3 };
    expect(expectedDetection(bright, sizes, depth)).toBeCloseTo(DEFAULT_DETECTION.ceiling, 4);
    expect(expectedDetection({ ...bright, magnitudeAb: 26 }, sizes, depth)).toBeLessThan(1e-4);
  });

  it('is lower for the same gas at twice the distance', () => {
    const at = (mpc: number) => {
      const expected = expectedCounterpart(8.5, mpc, 'r', 0);
      if (expected.kind !== 'expected') throw new Error(expected.reason);
      return expectedDetection(expected, expected.radiusArcsec, depth);
    };
    expect(at(25)).toBeGreaterThan(at(50));
    expect(at(50)).toBeGreaterThan(at(100));
  });

  it('takes less than 20 microseconds', () => {
    const calls = 20_000;
    const microseconds = [1, 2, 3].map(() => {
      const began = Date.now();
      for (let k = 0; k < calls; k++) expectedDetection(magnitudes, sizes, depth);
      return ((Date.now() - began) * 1000) / calls;
    });
    expect(Math.min(...microseconds)).toBeLessThan(20);
  });

  it('refuses a roll-off of zero', () => {
    expect(() => detectionProbability(20, 5, depth, { ...DEFAULT_DETECTION, rollOffMag: 0 })).toThrow(DomainError);
  });
});
