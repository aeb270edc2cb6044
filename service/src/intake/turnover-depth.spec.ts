import { describe, expect, it } from 'vitest';
import { turnoverDepth } from './turnover-depth.ts';

/** Expected counts 10^(0.4 m) that fade out at a magnitude with a completeness of a given width. */
function counts(depth: number, width: number, step = 0.25, scale = 5): number[] {
  return Array.from({ length: 60 }, (_, i) => {
    const m = 14 + (i + 0.5) * step;
    const seen = 1 / (1 + Math.exp((m - depth) / width));
    return Math.round(scale * 10 ** (0.4 * (m - 16)) * seen);
  });
}

describe('the depth from the counts', () => {
  // Source: the maximum of 10^(0.4 m) / (1 + exp((m - d) / w)) lies at d + w ln(k / (1 - k)), k = 0.4 w ln 10.
  it.each([
    [22, 0.2],
    [20.6, 0.15],
    [23.1, 0.3],
  ])('is where they turn over, for a completeness that falls at %f over %f mag', (depth, width) => {
    const k = 0.4 * width * Math.LN10;
    const truth = depth + width * Math.log(k / (1 - k));
    const found = turnoverDepth({ start: 14, step: 0.25, counts: counts(depth, width) })!;
    expect(Math.abs(found.magnitude - truth)).toBeLessThan(2 * found.uncertainty);
    expect(found.uncertainty).toBeLessThan(0.4);
    // The bins are 0.25 mag wide.
    expect(found.uncertainty).toBeGreaterThanOrEqual(0.25);
  });

  it('is less sure with fewer objects', () => {
    const many = turnoverDepth({ start: 14, step: 0.25, counts: counts(22, 0.4, 0.25, 5) })!;
    const few = turnoverDepth({ start: 14, step: 0.25, counts: counts(22, 0.4, 0.25, 0.4) })!;
    expect(few.uncertainty).toBeGreaterThan(many.uncertainty);
  });

  it('of a table cut at a magnitude is the cut', () => {
    const cut = counts(30, 0.2).slice(0, 24); // complete to 20.0
    const found = turnoverDepth({ start: 14, step: 0.25, counts: cut })!;
    expect(Math.abs(found.magnitude - 20)).toBeLessThan(0.4);
  });

  it.each([
    ['of few objects', [1, 3, 9, 27, 40, 20]],
    ['that only fall', [4000, 1000, 200, 10]],
    ['of nothing', []],
  ])('is not told for counts %s', (_, list) => {
    expect(turnoverDepth({ start: 14, step: 0.25, counts: list })).toBeUndefined();
  });
});
