import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { circleOverlap, maskedProbability } from './mask-overlap.ts';
import { starMaskRadius } from './star-mask.ts';

describe('bright-star mask', () => {
  // Legacy Surveys relation as in its public source code
  it.each([
    [4, 429.1863798474905],
    [6, 220.22929812126466],
    [8, 113.00671696110085],
    [10, 57.98737128651492],
    [12, 29.755180215328142],
    [14, 15.268337398362977],
  ])('of G = %d is %d arcsec', (g, radius) => {
    expect(Math.abs(starMaskRadius(g) / radius - 1)).toBeLessThan(1e-6);
  });
});

describe('overlap of circles', () => {
  it('of a mask wholly inside is its area: 20 in 60 arcsec is one ninth', () => {
    expect(circleOverlap(60, 20, 5) / (Math.PI * 60 ** 2)).toBeCloseTo(1 / 9, 12);
  });

  it('of 60 and 58 arcsec, 80 apart, is 2279.09 square arcsec (circle-circle intersection)', () => {
    expect(circleOverlap(60, 58, 80)).toBeCloseTo(2279.0913660335536, 6);
    expect(circleOverlap(60, 58, 80) / (Math.PI * 3600)).toBeCloseTo(0.20151592036794458, 6);
  });

  it('is nothing when they touch or part, and does not care which is which', () => {
    expect(circleOverlap(3, 4, 7)).toBe(0);
    expect(circleOverlap(3, 4, 70)).toBe(0);
    expect(circleOverlap(3, 4, 5)).toBeCloseTo(circleOverlap(4, 3, 5), 12);
    expect(() => circleOverlap(-1, 1, 0)).toThrow(DomainError);
  });
});

describe('masked probability', () => {
  it('of a central mask is that of a Rayleigh deviate', () => {
    const mask = [{ eastArcsec: 0, northArcsec: 0, radiusArcsec: 15 }];
    const expected = -Math.expm1(-0.5 * 1.5 ** 2) / -Math.expm1(-0.5 * 6 ** 2);
    expect(Math.abs(maskedProbability(10, 60, mask) - expected)).toBeLessThan(0.002);
  });

  it('of a wide mask to the east is half', () => {
    const mask = [{ eastArcsec: 1e6, northArcsec: 0, radiusArcsec: 1e6 }];
    expect(Math.abs(maskedProbability(10, 40, mask) - 0.5)).toBeLessThan(0.005);
  });

  it('counts overlapping masks once, and far ones not at all', () => {
    const mask = { eastArcsec: 5, northArcsec: 5, radiusArcsec: 12 };
    expect(maskedProbability(10, 40, [mask, mask])).toBe(maskedProbability(10, 40, [mask]));
    expect(maskedProbability(10, 40, [{ eastArcsec: 500, northArcsec: 0, radiusArcsec: 100 }])).toBe(0);
  });
});
