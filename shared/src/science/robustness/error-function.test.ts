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

  it('is seamless where the methods meet', () => {
    expect(Math.abs(erfc(2.5 - 1e-12) / erfc(2.5 + 1e-12) - 1)).toBeLessThan(1e-10);
  });

  it('gives half at zero and 0.9750021 at 1.96', () => {
    expect(normalCdf(0)).toBe(0.5);
    expect(normalCdf(1.96)).toBeCloseTo(0.9750021048517795, 12);
    expect(normalCdf(-40)).toBe(0);
    expect(normalCdf(40)).toBe(1);
  });
});
