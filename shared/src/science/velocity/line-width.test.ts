import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import {
  inclinationOf,
  MEAN_SIN_INCLINATION,
  MEDIAN_INCLINATION,
  randomInclination,
  rotationOfUnknownInclination,
  rotationVelocity,
} from './inclination.ts';
import {
  toDispersion,
  TURBULENCE,
  withoutInstrument,
  withoutLinearTurbulence,
  withoutResolutionGaussian,
  withoutResolutionLinear,
  withoutTurbulence,
} from './line-width.ts';
import { velocityDifference, withinVelocityWindow } from './window.ts';

describe('line widths', () => {
  it('give the check value 3.w50.springob', () => {
    // Source: Springob et al. (2005), ApJS 160, 149 (from memory); 1e-9.
    const width = withoutInstrument(120, 5.3, 0.02, 0.4);
    expect(width).toBeCloseTo(113.49019607843138, 9);
    expect(withoutLinearTurbulence(width, 6.5)).toBeCloseTo(106.99019607843138, 9);
  });

  it('give the check value 3.w50.bottinelli', () => {
    // Source: Bottinelli et al. (1990), A&AS 82, 391 (from memory); 1e-9.
    expect(withoutResolutionLinear(120, 10, 50)).toBeCloseTo(118.7, 9);
    expect(withoutResolutionLinear(120, 10, 20)).toBeCloseTo(114.5, 9);
  });

  it('give the check value 3.w50.gauss', () => {
    // Source: convolution of Gaussians; 1e-9.
    expect(withoutResolutionGaussian(30, 10)).toBeCloseTo(28.284271247461902, 9);
    expect(withoutResolutionGaussian(8, 10)).toBe(0);
  });

  // Source: Tully & Fouqué (1985), ApJS 58, 67 eq. 12; Verheijen & Sancisi (2001), A&A 370, 765; 1e-6.
  it.each([
    [300, 262.073346990419, 278.0424667474275],
    [150, 119.70051013855432, 132.53124662672946],
    [80, 61.73044467577093, 70.71274532411569],
  ])('give the check value 3.w20.tullyfouque.%d', (width, tullyFouque, verheijenSancisi) => {
    expect(withoutTurbulence(width, TURBULENCE.tullyFouque20)).toBeCloseTo(tullyFouque, 6);
    expect(withoutTurbulence(width, TURBULENCE.verheijenSancisi20)).toBeCloseTo(verheijenSancisi, 6);
  });

  it('are refused when negative, and never become so', () => {
    expect(() => withoutInstrument(-1, 5, 0)).toThrow(DomainError);
    expect(withoutInstrument(3, 10, 0)).toBe(0);
    expect(withoutTurbulence(10, TURBULENCE.tullyFouque20)).toBe(0);
    expect(toDispersion(2.3548200450309493)).toBeCloseTo(1, 12);
  });
});

describe('inclination', () => {
  // Source: oblate spheroid with q0 = 0.2; 1e-6. 3.incl.*
  it.each([
    [1, 0, 0],
    [0.7, 46.79166084923599, 0.7288689868556626],
    [0.5, 62.114433163906284, 0.8838834764831843],
    [0.2, 90, 1],
  ])('gives the check value of b/a = %d', (axisRatio, inclinationDeg, sine) => {
    const inclination = inclinationOf(axisRatio, 0.2);
    expect(inclination / DEGREE).toBeCloseTo(inclinationDeg, 6);
    expect(Math.sin(inclination)).toBeCloseTo(sine, 6);
  });

  it('gives the check value 3.incl.mean from its own distribution', () => {
    // Source: isotropy; the mean is integrated here over evenly spread quantiles.
    const n = 20_000;
    let sum = 0;
    for (let i = 0; i < n; i++) sum += Math.sin(randomInclination((i + 0.5) / n));
    expect(sum / n).toBeCloseTo(0.7853981633974483, 5);
    expect(MEAN_SIN_INCLINATION).toBeCloseTo(0.7853981633974483, 12);
    expect(randomInclination(0.5)).toBeCloseTo(MEDIAN_INCLINATION, 12);
    expect(MEDIAN_INCLINATION / DEGREE).toBeCloseTo(60, 9);
  });

  it('leaves a lower limit where it is unknown', () => {
    const range = rotationOfUnknownInclination(60);
    expect(range.lowestKms).toBeCloseTo(30, 12);
    expect(range.medianKms).toBeCloseTo(30 / Math.sin(60 * DEGREE), 9);
    expect(range.lower16Kms).toBeLessThan(range.medianKms);
    expect(range.upper84Kms).toBeGreaterThan(range.medianKms);
    expect(() => rotationVelocity(60, 0)).toThrow(DomainError);
  });
});

describe('velocityDifference', () => {
  it('is taken in the rest frame of the reference, inclusive at the window', () => {
    const limit = 3000 + 500 * (1 + 3000 / 299_792.458);
    expect(velocityDifference(limit, 3000)).toBeCloseTo(500, 9);
    expect(withinVelocityWindow(1500, 0, 1500)).toBe(true);
    expect(withinVelocityWindow(limit + 0.001, 3000, 500)).toBe(false);
    expect(() => velocityDifference(Number.NaN, 0)).toThrow(DomainError);
  });
});
