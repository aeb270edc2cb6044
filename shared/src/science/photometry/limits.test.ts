import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { gasToLight } from '../hydrogen/gas-to-light.ts';
import { extendedLimit, pointSourceArea, surfaceLimitInBox, surfaceLimitInside } from './extended-depth.ts';
import { absoluteMagnitude, physicalLimit } from './limits.ts';
import {
  convertSurfaceLimit,
  exponentialDisc,
  meanSurfaceBrightness,
  SERSIC_B1,
  EXPONENTIAL_CENTRE_MAG,
  EXPONENTIAL_EDGE_MAG,
} from './surface-brightness.ts';

const off = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('physical limit', () => {
  // definitions, computed independently: [name, m, E(B-V), R, D, Sun, M/L, M, L, M*, M_HI/L, M_HI/M*] for M_HI 8.3e7
  it.each([
    [
      'PS1 r 5 sigma point',
      23.2,
      0.08,
      2.271,
      28,
      4.64,
      1,
      -9.217470156711098,
      349130.71890065284,
      349130.71890065284,
      237.73330591290116,
      237.73330591290116,
    ],
    [
      'SDSS g 22.2',
      22.2,
      0.03,
      3.303,
      28,
      5.1,
      0.5,
      -10.134880156711098,
      1241515.2618870123,
      620757.6309435061,
      66.8537895167282,
      133.7075790334564,
    ],
    [
      'Legacy Surveys r 23.4',
      23.4,
      0.03,
      2.176,
      28,
      4.61,
      1,
      -8.9010701567111,
      253762.86138020852,
      253762.86138020852,
      327.07701808123346,
      327.07701808123346,
    ],
    [
      '2MASS Ks 14.3 Vega',
      14.3,
      0.03,
      0.31,
      28,
      3.27,
      0.6,
      -17.945090156711096,
      306221770.17286235,
      183733062.10371742,
      0.27104539286395757,
      0.45174232143992926,
    ],
    [
      'WISE W1 16.9 Vega',
      16.9,
      0.03,
      0.189,
      28,
      3.26,
      0.6,
      -15.341460156711097,
      27579352.307214513,
      16547611.384328708,
      3.0094977965921244,
      5.015829660986874,
    ],
    [
      'g 25 total',
      25,
      0,
      0,
      25,
      5.1,
      0.5,
      -6.9897000433601875,
      68529.88725894903,
      34264.94362947452,
      1211.1503946646487,
      2422.3007893292975,
    ],
  ])('of %s', (_name, m, ebv, r, d, sun, ml, absolute, light, mass, toLight, toMass) => {
    const limit = physicalLimit(m, r * ebv, d, sun, ml);
    expect(limit.absoluteMag).toBeCloseTo(absolute, 6);
    expect(off(limit.luminositySolar, light)).toBeLessThan(1e-6);
    expect(off(limit.stellarMassSolar, mass)).toBeLessThan(1e-6);
    expect(off(gasToLight(8.3e7, limit.luminositySolar, true).ratio, toLight)).toBeLessThan(1e-6);
    expect(off(gasToLight(8.3e7, limit.stellarMassSolar, true).ratio, toMass)).toBeLessThan(1e-6);
  });

  it('refuses no distance and no mass-to-light ratio', () => {
    expect(() => absoluteMagnitude(20, 0, 0)).toThrow(DomainError);
    expect(() => absoluteMagnitude(NaN, 0, 10)).toThrow(DomainError);
    expect(() => physicalLimit(20, 0, 10, 4.64, 0)).toThrow(DomainError);
  });
});

describe('depth for extended sources', () => {
  // white noise, half the light inside r_e; computed independently: r_e 2, 5, 10, 20 arcsec; to 1e-4 mag
  it.each([
    [
      'PS1 r',
      23.2,
      1.2,
      3.2632993021155796,
      26.89669300914122,
      [21.715458805072707, 20.720608783392613, 19.96803379423266, 19.215458805072707],
      [25.2160584542879, 26.210908475967997, 26.963483465127947, 27.7160584542879],
    ],
    [
      'SDSS r',
      22.7,
      1.3,
      3.829844319843979,
      26.48359827478925,
      [21.30236407072074, 20.307514049040645, 19.55493905988069, 18.80236407072074],
      [24.80296371993593, 25.797813741616025, 26.55038873077598, 27.30296371993593],
    ],
    [
      'Legacy Surveys r',
      23.9,
      1.2,
      3.2632993021155796,
      27.59669300914122,
      [22.415458805072706, 21.420608783392613, 20.66803379423266, 19.915458805072706],
      [25.9160584542879, 26.910908475967997, 27.663483465127946, 28.4160584542879],
    ],
  ])('of %s', (_name, limitMag, fwhmArcsec, area, box, totals, means) => {
    const depth = { limitMag, fwhmArcsec };
    expect(pointSourceArea(fwhmArcsec)).toBeCloseTo(area, 9);
    expect(surfaceLimitInBox(depth, 3, 10)).toBeCloseTo(box, 4);
    [2, 5, 10, 20].forEach((radius, k) => {
      expect(Math.abs(extendedLimit(depth, radius) - totals[k]!)).toBeLessThan(1e-4);
      expect(Math.abs(surfaceLimitInside(depth, radius) - means[k]!)).toBeLessThan(1e-4);
    });
  });

  it('makes the limit on stars 19.6 times weaker than the point-source depth would (r_e 10 arcsec, 28 Mpc, M/L 1)', () => {
    const depth = { limitMag: 23.2, fwhmArcsec: 1.2 };
    const point = physicalLimit(23.2, 0, 28, 4.64, 1);
    const extended = physicalLimit(extendedLimit(depth, 10), 0, 28, 4.64, 1);
    expect(point.absoluteMag).toBeCloseTo(-9.035790156711098, 6);
    expect(off(point.stellarMassSolar, 295335.7784033852)).toBeLessThan(1e-4);
    expect(extended.absoluteMag).toBeCloseTo(-12.267756362478437, 4);
    expect(off(extended.stellarMassSolar, 5795655.2645465005)).toBeLessThan(1e-4);
    expect(off(extended.stellarMassSolar / point.stellarMassSolar, 19.623952424181024)).toBeLessThan(1e-4);
  });

  it('is never deeper than the point-source depth, and takes the penalty off', () => {
    const depth = { limitMag: 23.2, fwhmArcsec: 1.2 };
    expect(extendedLimit(depth, 0)).toBe(23.2);
    expect(extendedLimit(depth, 0.3)).toBe(23.2);
    expect(extendedLimit(depth, 10, 0.75)).toBeCloseTo(19.96803379423266 - 0.75, 4);
  });

  it('refuses a missing depth or image quality', () => {
    expect(() => extendedLimit({ limitMag: NaN, fwhmArcsec: 1 }, 5)).toThrow(DomainError);
    expect(() => extendedLimit({ limitMag: 23, fwhmArcsec: 0 }, 5)).toThrow(DomainError);
  });
});

describe('surface brightness', () => {
  it('inside r_e of magnitude 21 at 10 arcsec is 27.995 (definition)', () => {
    expect(meanSurfaceBrightness(21, 10)).toBeCloseTo(27.995449670895287, 6);
    expect(meanSurfaceBrightness(21, 10, 0.5)).toBeCloseTo(27.995449670895287 - 0.752575, 6);
  });

  it('of an exponential disc: Graham & Driver (2005), b_1 = 1.6783, to 0.001 mag', () => {
    const { central, atEffectiveRadius } = exponentialDisc(27);
    expect(Math.abs(central - 25.8756)).toBeLessThan(0.001);
    expect(Math.abs(atEffectiveRadius - 27.6976)).toBeLessThan(0.001);
  });

  it('has the Sersic constants of n = 1', () => {
    // b_1 solves gamma(2, b) = Gamma(2) / 2, that is (1 + b) e^-b = 1/2
    expect((1 + SERSIC_B1) * Math.exp(-SERSIC_B1)).toBeCloseTo(0.5, 12);
    expect(EXPONENTIAL_EDGE_MAG).toBeCloseTo(0.6978333210488931, 4);
    expect(EXPONENTIAL_CENTRE_MAG).toBeCloseTo(1.82224209120833, 4);
  });

  it('limits convert between significance and box: Roman, Trujillo & Montes (2020), form from memory', () => {
    expect(convertSurfaceLimit(26.9, 3, 10, 1, 3)).toBeCloseTo(26.78560627359831, 6);
  });
});
