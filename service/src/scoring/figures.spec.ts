import { describe, expect, it } from 'vitest';
import { mpcWithError, powerFigure, probabilityUnder } from './figures.ts';

describe('the figures in sentences', () => {
  it.each([
    [0.996, '0.996'],
    [0.9899, '0.989'],
    [0.99991, 'over 0.999'],
    [1, '1.000'],
    [0, '0.000'],
    [0.29, '0.290'],
  ])('write the power %d as %s, never nearer to one than it is', (power, text) => {
    expect(powerFigure(power)).toBe(text);
  });

  it.each([
    [0.42, 0.8, '0.42'],
    [0.798, 0.8, '0.798'],
    [0.79999, 0.8, '0.799'],
    [0.0004, 0.8, 'under 0.001'],
  ])('write %d so that it is seen to be under %d', (p, limit, text) => {
    expect(probabilityUnder(p, limit)).toBe(text);
  });

  it.each([
    [71.234, 6.81, '71 +/- 7 Mpc'],
    [71.234, 1.26, '71.2 +/- 1.3 Mpc'],
    [0.7534, 0.021, '753 +/- 21 kpc'],
  ])('write the distance %d with its error %d to the digit the error bears', (x, error, text) => {
    expect(mpcWithError(x, error)).toBe(text);
  });
});
