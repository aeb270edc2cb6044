import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import {
  SOLAR_LUMINOSITY_ERG,
  STAR_FORMATION_LOG_C,
  nuLuminosity,
  nuLuminosityOfAb,
  starFormationRate,
  starFormationRateW4,
} from './star-formation.ts';
import { stellarMassFromColour, stellarMassFromW1 } from './stellar-mass.ts';

const off = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('star-formation limit', () => {
  it('has the constants of Kennicutt & Evans (2012), Table 1 (FUV verified, others from memory)', () => {
    expect(STAR_FORMATION_LOG_C).toEqual({
      FUV: 43.35,
      NUV: 43.17,
      Halpha: 41.27,
      TIR: 43.41,
      '24um': 42.69,
      '70um': 43.23,
      '1.4GHz': 28.2,
    });
  });

  // Kennicutt & Evans (2012): log SFR = log L - log C; at 28 Mpc, to 1e-4
  it.each([
    ['FUV' as const, 19.9, 0.2418, 0.1535, 9.112957403512825e40, 0.0040706085481197985],
    ['NUV' as const, 20.8, 0.2385, 0.2301, 2.6456421520133427e40, 0.0017886736179556278],
    ['NUV' as const, 22.7, 0.2385, 0.2301, 4.597599124343127e39, 0.00031083584956454483],
  ])('of %s %d', (tracer, m, a, micron, erg, rate) => {
    const light = nuLuminosityOfAb(m, a, micron, 28);
    expect(off(light, erg)).toBeLessThan(1e-4);
    expect(off(starFormationRate(light, tracer), rate)).toBeLessThan(1e-4);
  });

  // 24 micron: Kennicutt & Evans (2012); W4: Cluver et al. (2017), ApJ 850, 68 (from memory)
  it.each([
    [6, 7.4005521519725e40, 19332685.872446448, 0.015109988140188177, 0.045389704757772965],
    [5, 6.167126793310418e40, 16110571.560372042, 0.012591656783490139, 0.038415502436746046],
  ])('of W4 %d mJy', (mjy, erg, solar, ke12, cluver) => {
    const light = nuLuminosity(mjy, 22.8, 28);
    expect(off(light, erg)).toBeLessThan(1e-4);
    expect(off(light / SOLAR_LUMINOSITY_ERG, solar)).toBeLessThan(1e-4);
    expect(off(starFormationRate(light, '24um'), ke12)).toBeLessThan(1e-4);
    expect(off(starFormationRateW4(light), cluver)).toBeLessThan(1e-4);
  });

  it('refuses a flux of zero', () => {
    expect(() => nuLuminosity(0, 22.8, 28)).toThrow(DomainError);
  });
});

describe('stellar mass', () => {
  it('from colour: Taylor et al. (2011), MNRAS 418, 1587, eq. 8, form from memory', () => {
    expect(stellarMassFromColour(0.3, -10)).toBeCloseTo(5.36, 9);
  });

  it('from W1: Cluver et al. (2014), ApJ 782, 90, Sun 3.24 Vega', () => {
    expect(off(stellarMassFromW1(-15, 0), 18450154.191794775)).toBeLessThan(1e-6);
  });

  it('from W1 without a colour takes M/L 0.6, and clips a wild colour', () => {
    expect(off(stellarMassFromW1(-15, NaN), 0.6 * 19769696.40111866)).toBeLessThan(1e-6);
    expect(stellarMassFromW1(-15, 3)).toBe(stellarMassFromW1(-15, 0.6));
    expect(() => stellarMassFromW1(NaN, 0)).toThrow(DomainError);
  });
});
