import { describe, expect, it } from 'vitest';
import { addHistograms, magnitudeHistogram } from './magnitude-histogram.ts';

const MAGNITUDES = [17.1, 17.24, 17.25, NaN, -3.1, 21, Infinity, 17.2];

describe('a histogram of magnitudes', () => {
  it('counts every magnitude in the bin that holds it, the bright edge included', () => {
    const { firstBin, counts, widthMag } = magnitudeHistogram([17.1, 17.24, 17.25, 17.6], 0.25);
    expect([firstBin * widthMag, [...counts]]).toEqual([17, [2, 1, 1]]);
  });

  it('leaves out what is missing and what does not count', () => {
    const sum = (counts: Float64Array) => counts.reduce((a, b) => a + b, 0);
    expect(sum(magnitudeHistogram(MAGNITUDES, 0.25).counts)).toBe(6);
    const few = magnitudeHistogram(MAGNITUDES, 0.25, (i) => i < 3);
    expect([few.firstBin, [...few.counts]]).toEqual([68, [2, 1]]);
    expect(magnitudeHistogram([NaN], 0.25).counts).toHaveLength(0);
  });

  it('of parts of a table adds up to that of the table, in any parts', () => {
    const whole = magnitudeHistogram(MAGNITUDES, 0.25);
    for (const cut of [0, 1, 3, 4, 7, 8]) {
      const parts = [MAGNITUDES.slice(0, cut), MAGNITUDES.slice(cut)].map((part) => magnitudeHistogram(part, 0.25));
      expect(addHistograms(parts, 0.25)).toEqual(whole);
    }
  });
});
