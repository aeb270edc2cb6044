import { describe, expect, it } from 'vitest';
import { clusteredShare, densityAt, velocityHistogram } from './velocity-background.ts';
import { unrelatedDensity, velocityFactor, DEFAULT_VELOCITY_MODEL } from './velocity-term.ts';

/** Velocities spread evenly over 0 to 90,000 km/s. */
const EVEN = Array.from({ length: 9000 }, (_, i) => 10 * i + 5);

describe('the measured spread of redshifts', () => {
  it('is one over the range for an even spread, away from its ends', () => {
    const histogram = velocityHistogram(EVEN)!;
    expect(histogram.objects).toBe(9000);
    expect(densityAt(histogram, 40_000)).toBeCloseTo(1 / 90_000, 12);
    expect(densityAt(histogram, 500)).toBeCloseTo(2 / 3 / 90_000, 12);
  });

  it('is not measured from a few, and leaves out what is missing, negative or beyond z = 0.3', () => {
    expect(velocityHistogram(EVEN.slice(0, 499))).toBeUndefined();
    expect(velocityHistogram([...EVEN, NaN, -300, 120_000])!.objects).toBe(9000);
  });

  it('never falls to zero where no object was seen', () => {
    const histogram = velocityHistogram(EVEN.map((cz) => cz / 9))!;
    expect(densityAt(histogram, 60_000)).toBeCloseTo(0.5 / 9000 / 3000, 15);
  });

  it('stands in for the uniform density, but not for a detection without a velocity', () => {
    const model = { ...DEFAULT_VELOCITY_MODEL, histogram: velocityHistogram(EVEN)! };
    expect(unrelatedDensity(model, 40_000)).toBeCloseTo(1 / 90_000, 12);
    expect(unrelatedDensity(model, NaN)).toBe(1 / 18_000);
    expect(unrelatedDensity(DEFAULT_VELOCITY_MODEL, 40_000)).toBe(1 / 18_000);
  });
});

describe('the share that clusters', () => {
  it('is what makes the concordant ones out of all', () => {
    // 100 objects, 10 concordant by the spread alone if none clustered: s = (C - e) / (N - e).
    expect(clusteredShare({ objects: 100, concordant: 10, expected: 10 }, 0, 0)).toBe(0);
    expect(clusteredShare({ objects: 100, concordant: 55, expected: 10 }, 0, 0)).toBeCloseTo(0.5, 12);
    expect(clusteredShare({ objects: 100, concordant: 100, expected: 10 }, 0, 0)).toBe(1);
    expect(clusteredShare({ objects: 100, concordant: 2, expected: 10 }, 0, 0)).toBe(0);
  });

  it('keeps to the fallback where there is nothing to count, and leaves it as counts grow', () => {
    expect(clusteredShare({ objects: 0, concordant: 0, expected: 0 }, 0.33, 20)).toBeCloseTo(0.33, 12);
    const few = clusteredShare({ objects: 2, concordant: 2, expected: 0 }, 0, 20);
    const many = clusteredShare({ objects: 200, concordant: 200, expected: 0 }, 0, 20);
    expect(few).toBeLessThan(0.1);
    expect(many).toBeGreaterThan(0.9);
  });

  it('takes the bonus from a concordant velocity where all others share it', () => {
    const field = velocityFactor(20, 42, { ...DEFAULT_VELOCITY_MODEL, clusteredFraction: 0 });
    const cluster = velocityFactor(20, 42, { ...DEFAULT_VELOCITY_MODEL, clusteredFraction: 1 });
    expect(field / cluster).toBeGreaterThan(10);
  });
});
