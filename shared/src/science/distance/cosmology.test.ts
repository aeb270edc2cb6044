import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import {
  angularDiameterDistance,
  comovingDistance,
  distanceModulus,
  luminosityDistance,
  luminosityDistanceSecondOrder,
  redshiftAtComovingDistance,
  redshiftAtLuminosityDistance,
} from './cosmology.ts';
import { kpcPerArcmin } from './projection.ts';

const STANDARD = { h0: 70, omegaM: 0.3 };
const PLANCK = { h0: 67.66, omegaM: 0.30966 };
const relative = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('flat ΛCDM distances', () => {
  // Source: astropy.cosmology FlatLambdaCDM without radiation; 1e-6 relative asked. 4.lcdm.*
  it.each([
    [
      0.001, 4.281785572845712, 4.286067358418558, 4.277508064780932, 28.160294959940178, 1.2442766585173026,
      4.286068530785,
    ],
    [
      0.0083, 35.4803181207711, 35.7748047611735, 35.18825559929694, 32.76788636151248, 10.235848637351033,
      35.775474939778654,
    ],
    [
      0.02, 85.26790962937666, 86.9732678219642, 83.59598983272221, 34.696928940024044, 24.317087734078438,
      86.98264031400001,
    ],
    [
      0.05, 211.7038615805877, 222.28905465961708, 201.6227253148454, 36.73459039451254, 58.649673393136226,
      222.43529696250002,
    ],
    [
      0.06, 253.454023840369, 268.66126527079115, 239.10756966072546, 37.146025278727315, 69.55357261702267,
      268.91383482599997,
    ],
    [
      0.1, 418.4544876277049, 460.2999363904754, 380.4131705706408, 38.31520457439093, 110.65770574014128,
      461.46624785000006,
    ],
    [
      0.2, 816.7232390546322, 980.0678868655586, 680.6026992121936, 39.956280796166446, 197.97929998688994,
      989.3151114000001,
    ],
  ])('give the check values at z = %d', (z, comoving, luminosity, angular, modulus, arcmin, secondOrder) => {
    expect(relative(comovingDistance(z, STANDARD), comoving)).toBeLessThan(1e-9);
    expect(relative(luminosityDistance(z, STANDARD), luminosity)).toBeLessThan(1e-9);
    expect(relative(angularDiameterDistance(z, STANDARD), angular)).toBeLessThan(1e-9);
    expect(relative(distanceModulus(luminosityDistance(z, STANDARD)), modulus)).toBeLessThan(1e-9);
    expect(relative(kpcPerArcmin(angularDiameterDistance(z, STANDARD)), arcmin)).toBeLessThan(1e-9);
    expect(relative(luminosityDistanceSecondOrder(z, STANDARD), secondOrder)).toBeLessThan(1e-9);
  });

  it.each([
    [0.0083, 37.00984004159529, 36.40304174311392],
    [0.05, 229.8937151617066, 208.5203765639062],
  ])('give the check value 4.lcdm.planck.%d', (z, luminosity, angular) => {
    expect(relative(luminosityDistance(z, PLANCK), luminosity)).toBeLessThan(1e-9);
    expect(relative(angularDiameterDistance(z, PLANCK), angular)).toBeLessThan(1e-9);
  });

  it('give the check value 4.dl.mixed with a peculiar velocity taken off', () => {
    // Source: Davis et al. (2011), ApJ 741, 67 (form, from memory); 1e-6 relative.
    expect(relative(luminosityDistance(0.05, STANDARD, 0.0488), 222.03501002572037)).toBeLessThan(1e-9);
  });

  it('reproduce the closed form of a universe of matter alone, and of one without', () => {
    // Source: textbook: D_C = 2c/H0 (1 - 1/sqrt(1+z)) for omegaM = 1, and cz/H0 for omegaM = 0.
    for (const z of [0.01, 0.5, 3, 1100]) {
      const hubble = 299_792.458 / 70;
      const matter = 2 * hubble * (1 - 1 / Math.sqrt(1 + z));
      expect(relative(comovingDistance(z, { h0: 70, omegaM: 1 }), matter)).toBeLessThan(1e-12);
      expect(relative(comovingDistance(z, { h0: 70, omegaM: 0 }), hubble * z)).toBeLessThan(1e-12);
    }
  });

  it('are undone by their inverses', () => {
    for (const z of [1e-6, 0.0083, 0.2, 2, 20, 900]) {
      expect(relative(redshiftAtComovingDistance(comovingDistance(z, STANDARD), STANDARD), z)).toBeLessThan(1e-9);
      expect(relative(redshiftAtLuminosityDistance(luminosityDistance(z, STANDARD), STANDARD), z)).toBeLessThan(1e-9);
    }
    expect(redshiftAtComovingDistance(0, STANDARD)).toBe(0);
  });

  it('refuse what has no distance', () => {
    expect(() => comovingDistance(-0.001, STANDARD)).toThrow(DomainError);
    expect(() => comovingDistance(0.1, { h0: 0, omegaM: 0.3 })).toThrow(DomainError);
    expect(() => redshiftAtLuminosityDistance(-1, STANDARD)).toThrow(DomainError);
    expect(() => distanceModulus(0)).toThrow(DomainError);
  });
});
