import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { erfc } from './error-function.ts';
import { incompleteGamma, logGamma, upperIncompleteGamma } from './gamma-function.ts';

const off = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('gamma functions', () => {
  it('are factorials at integers and sqrt(pi) at one half', () => {
    expect(off(Math.exp(logGamma(11)), 3628800)).toBeLessThan(1e-12);
    expect(off(Math.exp(logGamma(0.5)), Math.sqrt(Math.PI))).toBeLessThan(1e-13);
    expect(
      off(Math.exp(logGamma(0.255)) * Math.exp(logGamma(0.745)), Math.PI / Math.sin(0.255 * Math.PI)),
    ).toBeLessThan(1e-12);
  });

  it.each([0.1, 1, 3, 9])('of one half are error functions at %d (DLMF 7.11.1)', (x) => {
    expect(off(incompleteGamma(0.5, x).upper, erfc(Math.sqrt(x)))).toBeLessThan(1e-12);
  });

  it.each([
    [3, 0.5],
    [3, 3.9],
    [3, 4.1],
    [3, 30],
  ])('of %d at %d are the sum of Poisson terms', (a, x) => {
    const sum = Math.exp(-x) * (1 + x + x ** 2 / 2);
    expect(off(incompleteGamma(a, x).upper, sum)).toBeLessThan(1e-12);
    expect(incompleteGamma(a, x).lower + incompleteGamma(a, x).upper).toBeCloseTo(1, 14);
  });

  it('holds for shapes below zero: Gamma(0, 1) = 0.21938393439552029 (exponential integral, Abramowitz & Stegun Table 5.1)', () => {
    expect(off(upperIncompleteGamma(0, 1), 0.21938393439552029)).toBeLessThan(1e-12);
    expect(off(upperIncompleteGamma(0, 2), 0.04890051070806112)).toBeLessThan(1e-12);
  });

  it.each([
    [-0.05, 0.2],
    [-0.25, 0.0115],
    [-1, 0.7],
    [-1.3, 1.49],
    [-1.3, 1.51],
    [-0.5, 12],
  ])('of %d at %d is the integral of t^(a-1) e^-t', (a, x) => {
    // Independent check by Simpson's rule in ln t.
    const steps = 20_000;
    const from = Math.log(x);
    const h = (Math.log(800) - from) / steps;
    let sum = 0;
    for (let k = 0; k <= steps; k++) {
      const t = Math.exp(from + k * h);
      sum += (k === 0 || k === steps ? 1 : k % 2 ? 4 : 2) * t ** a * Math.exp(-t);
    }
    expect(off(upperIncompleteGamma(a, x), (sum * h) / 3)).toBeLessThan(1e-9);
  });

  it('refuse what is out of range', () => {
    expect(() => logGamma(0)).toThrow(DomainError);
    expect(() => incompleteGamma(1, -1)).toThrow(DomainError);
    expect(() => upperIncompleteGamma(-0.5, 0)).toThrow(DomainError);
  });
});
