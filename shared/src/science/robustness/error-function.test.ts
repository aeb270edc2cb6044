import { describe, expect, it } from 'vitest';
import { erf, erfc, normalCdf } from './error-function.ts';

describe('error function', () => {
  // Abramowitz & Stegun, Tables 7.1 and 7.3
  it.each([
    [0.5, 0.5204998778],
    [1, 0.8427007929],
    [2, 0.995322265],
    [2.5, 0.999593048],
  ])('of %d', (x, value) => {
    expect(erf(x)).toBeCloseTo(value, 10);
    expect(erf(-x)).toBeCloseTo(-value, 10);
    expect(erfc(x)).toBeCloseTo(1 - value, 10);
  });

  it('keeps its relative precision far out: erfc(5) = 1.5374597944280349e-12 (DLMF 7.24, 40-digit evaluation)', () => {
    expect(Math.abs(erfc(5) / 1.5374597944280349e-12 - 1)).toBeLessThan(1e-13);
  });

  it.each([0.84375, 1.25, 1 / 0.35])('is seamless where the approximations meet, at %d', (x) => {
    expect(Math.abs(erfc(x - 1e-13) / erfc(x + 1e-13) - 1)).toBeLessThan(1e-11);
    expect(Math.abs(erf(x - 1e-13) / erf(x + 1e-13) - 1)).toBeLessThan(1e-11);
  });

  it('adds to one with its complement, is odd, and passes NaN on', () => {
    for (const x of [-30, -3, -1, -0.2, 0, 0.2, 0.9, 1.1, 2, 7, 30]) {
      expect(erf(x) + erfc(x)).toBeCloseTo(1, 14);
      expect(erf(-x)).toBe(-erf(x));
    }
    expect(erf(NaN)).toBeNaN();
    expect(erfc(NaN)).toBeNaN();
  });

  it('gives half at zero and 0.9750021 at 1.96', () => {
    expect(normalCdf(0)).toBe(0.5);
    expect(normalCdf(1.96)).toBeCloseTo(0.9750021048517795, 12);
    expect(normalCdf(-40)).toBe(0);
    expect(normalCdf(40)).toBe(1);
  });
});
