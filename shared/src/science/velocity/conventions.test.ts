import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { fromOpticalCz, toOpticalCz, toOpticalWidth, VELOCITY_CONVENTIONS } from './conventions.ts';

describe('velocity conventions', () => {
  // Source: Greisen et al. (2006), A&A 446, 747; 1e-6 km/s. 3.freq.*
  it.each([
    [1408.9, 0.008166478648591102, 2448.2487072656445, 2428.4170909425875, 2438.2522525069753],
    [1350, 0.05215240871703708, 15634.898799901172, 14859.918268842712, 15227.726265733569],
    [1381.05, 0.02849697821802266, 8543.179145553473, 8306.46985502613, 8421.499788165054],
    [1420.405751768, 0, 0, 0, 0],
    [1421, -0.0004181901703025348, -125.37025906643551, -125.42270961070818, -125.39647336914562],
    [1300, 0.09261980905230782, 27766.72021528201, 25412.975295922613, 26485.874173035434],
  ])('give the check values of the line at %d MHz', (frequency, z, optical, radio, relativistic) => {
    const cz = toOpticalCz('frequency', frequency);
    expect(Math.abs(cz - optical)).toBeLessThan(1e-6);
    expect(Math.abs(fromOpticalCz('redshift', cz) - z)).toBeLessThan(1e-12);
    expect(Math.abs(fromOpticalCz('radio', cz) - radio)).toBeLessThan(1e-6);
    expect(Math.abs(fromOpticalCz('relativistic', cz) - relativistic)).toBeLessThan(1e-6);
  });

  // Source: definitions; 1e-6 km/s. 3.conv.*
  it.each([
    [500, 499.1674782588113, 499.58304545996435, 0.8325217411887138],
    [2464.4, 2444.3069327981966, 2454.2712197727456, 20.09306720180348],
    [10_000, 9677.203245535437, 9833.307694043695, 322.7967544645635],
    [18_000, 16980.466679294197, 17460.54345690168, 1019.5333207058029],
  ])('give the check values at cz %d km/s', (cz, radio, relativistic, gap) => {
    expect(Math.abs(fromOpticalCz('radio', cz) - radio)).toBeLessThan(1e-6);
    expect(Math.abs(fromOpticalCz('relativistic', cz) - relativistic)).toBeLessThan(1e-6);
    expect(Math.abs(cz - fromOpticalCz('radio', cz) - gap)).toBeLessThan(1e-6);
  });

  it('give the check value 3.conv.back', () => {
    expect(Math.abs(toOpticalCz('radio', 9677.193) - 9999.989059556723)).toBeLessThan(1e-6);
  });

  it.each(VELOCITY_CONVENTIONS)('come back from %s, at small, large and negative velocities', (convention) => {
    for (const cz of [-300, -1e-3, 1e-6, 2464.4, 60_000, 600_000]) {
      const back = toOpticalCz(convention, fromOpticalCz(convention, cz));
      // A frequency holds 1 + z, so it keeps cz to 1e-16 of c only.
      expect(Math.abs(back - cz)).toBeLessThan(convention === 'frequency' ? 1e-9 : 1e-12 * (1 + Math.abs(cz)) * 10);
    }
  });

  it('place a line at cz 2464.4 at 1408.824715 MHz', () => {
    // Source: f = f0/(1+z), arithmetic.
    expect(fromOpticalCz('frequency', 2464.4)).toBeCloseTo(1408.824715, 6);
  });

  it('stretch a radio width by (1+z) squared', () => {
    const step = 1e-3;
    const slope = (toOpticalCz('radio', 9677.2 + step) - toOpticalCz('radio', 9677.2 - step)) / (2 * step);
    expect(toOpticalWidth(100, toOpticalCz('radio', 9677.2))).toBeCloseTo(100 * slope, 4);
  });

  it.each([
    ['radio', 299_792.458],
    ['relativistic', -3e5],
    ['frequency', 0],
    ['redshift', -1],
    ['optical', Number.NaN],
  ] as const)('refuse the %s value %d', (convention, value) => {
    expect(() => toOpticalCz(convention, value)).toThrow(DomainError);
  });
});
