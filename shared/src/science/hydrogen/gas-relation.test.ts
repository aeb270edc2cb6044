import { describe, expect, it } from 'vitest';
import { BANDS } from '../photometry/bands.ts';
import { luminosity } from '../photometry/limits.ts';
import { meanSurfaceBrightness } from '../photometry/surface-brightness.ts';
import {
  DEFAULT_GAS_STAR_RELATION,
  beyondRelation,
  meanHiMass,
  relationScatterMag,
  stellarMassFromGas,
  stellarMassOfMeanRelation,
} from './gas-relation.ts';
import { gasToLight, gasToLightFromFlux } from './gas-to-light.ts';
import { hiFlux } from './hi-mass.ts';

describe('mean gas relation', () => {
  // Huang et al. (2012), ApJ 756, 113, coefficients from memory
  it.each([
    [6, 7.389],
    [7, 8.101],
    [8, 8.813],
    [9, 9.525],
    [10, 9.802],
  ])('gives for log stellar mass %d log HI mass %d', (stars, gas) => {
    expect(meanHiMass(stars)).toBeCloseTo(gas, 9);
    expect(stellarMassOfMeanRelation(gas)).toBeCloseTo(stars, 6);
  });

  it('predicts the counterpart of 8.3e7 solar masses at 28 Mpc with M/L_r 0.7 (Huang et al. 2012, from memory)', () => {
    const stars = stellarMassOfMeanRelation(Math.log10(8.3e7));
    expect(stars).toBeCloseTo(6.744491702775385, 6);
    const light = 10 ** stars / 0.7;
    expect(light).toBeCloseTo(7932200.126484308, -1);
    const absolute = 4.64 - 2.5 * Math.log10(light);
    expect(absolute).toBeCloseTo(-12.608484156902819, 6);
    const apparent = absolute + 5 * Math.log10(28) + 25;
    expect(apparent).toBeCloseTo(19.62730599980828, 6);
    expect(meanSurfaceBrightness(apparent, 10)).toBeCloseTo(26.622755670703565, 6);
  });

  it('says how far a limit lies beyond it in its scatter', () => {
    expect(beyondRelation(8.101, 7)).toBeCloseTo(0, 9);
    expect(beyondRelation(8.101, 6.2)).toBeCloseTo(2, 9);
  });
});

describe('direct fit of stars given gas', () => {
  // definition: log M* = 9 + 1.1 (log M_HI - 9.5); scatter 1.3 exp(-0.4 (log M_HI - 9.5)), clipped to 0.7-2.5 mag
  it('passes through its pivot with its slope', () => {
    expect(stellarMassFromGas(9.5)).toBe(9);
    expect(stellarMassFromGas(8.5)).toBeCloseTo(7.9, 12);
  });

  it('scatters more at low mass, between its clips', () => {
    expect(relationScatterMag(9.5)).toBe(1.3);
    expect(relationScatterMag(8.5)).toBeCloseTo(1.3 * Math.exp(0.4), 12);
    expect(relationScatterMag(7)).toBe(2.5);
    expect(relationScatterMag(11.5)).toBe(0.7);
    expect(DEFAULT_GAS_STAR_RELATION.tailFraction).toBe(0.05);
  });
});

describe('gas-to-light ratio', () => {
  it('of AGC 229385 implies M_g -12.89 and m_g 19.10 (Janowiecki et al. 2015: 7.2e8, 25 Mpc, M_HI/L_g 46)', () => {
    const flux = hiFlux(7.2e8, 25);
    const { ratio, bound } = gasToLightFromFlux(flux, 19.103263381485952, 5.1, false);
    expect(ratio).toBeCloseTo(46, 6);
    expect(bound).toBe('value');
    expect(luminosity(-12.886436661874237, 5.1)).toBeCloseTo(15652173.913043479, -1);
  });

  // Janowiecki et al. (2015): limits of the two companions, at 25 Mpc with a solar magnitude of 5.10 in g
  it.each([
    ['AGC 229384', 2e8, -11.262887849978727, 57],
    ['AGC 229383', 1.2e8, -11.369548880533381, 31],
  ])('of %s is a lower limit', (_name, mass, absolute, expected) => {
    const result = gasToLight(mass, luminosity(absolute, 5.1), true);
    expect(result.ratio).toBeCloseTo(expected, 4);
    expect(result.bound).toBe('lower limit');
  });

  it('from flux agrees with the ratio at any distance', () => {
    const at = (mpc: number) => {
      const absolute = 18.3 - 5 * Math.log10(mpc) - 25;
      return gasToLight(2.356e5 * mpc ** 2 * 1.2, luminosity(absolute, BANDS.r.solarAb), false).ratio;
    };
    const direct = gasToLightFromFlux(1.2, 18.3, BANDS.r.solarAb, false).ratio;
    expect(at(5) / direct).toBeCloseTo(1, 9);
    expect(at(90) / direct).toBeCloseTo(1, 9);
    expect(gasToLightFromFlux(1.2, 18.3, BANDS.r.solarAb, false, 0.05).ratio).toBeCloseTo(direct / 1.05 ** 2, 9);
  });
});
