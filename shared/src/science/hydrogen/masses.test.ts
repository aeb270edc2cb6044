import { describe, expect, it } from 'vitest';
import { DEGREE, GRAVITATION_KPC_KMS2 } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { baryonicMass } from './baryonic-mass.ts';
import { baryonicMassFromSpeed, speedFromWidth, tullyFisherResidual } from './baryonic-tully-fisher.ts';
import { cloudDynamicalMass, dispersionMass, dynamicalMass } from './dynamical-mass.ts';

const off = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('dynamical mass', () => {
  it('is V^2 R / G with 1/G = 2.32509e5 (G = 4.30091e-6 kpc km^2 s^-2 per solar mass)', () => {
    expect(off(dynamicalMass(1, 1), 232508.93415579497)).toBeLessThan(1e-5);
  });

  // V^2 R / G, computed independently
  it.each([
    [25, 6, 871908503.0842311],
    [50, 10, 5812723353.894874],
    [100, 5.69, 13229758353.464735],
  ])('of %d km/s at %d kpc', (speed, radius, mass) => {
    expect(off(dynamicalMass(speed, radius), mass)).toBeLessThan(1e-5);
  });

  it('of a compact cloud uses 6098 a D W50^2 (Giovanelli et al. 2010 and Adams et al. 2013 print 6.2e3, from memory)', () => {
    expect(off(cloudDynamicalMass(10, 23, 1), 32260863.74080043)).toBeLessThan(1e-6);
    expect(off(cloudDynamicalMass(1, 1, 1), 6098.461954782688)).toBeLessThan(1e-6);
    expect(off(cloudDynamicalMass(1, 1, 1), 6200)).toBeLessThan(0.02);
  });

  it('of Cloud-9 from its dispersion is 7.73e6 (Anand et al. 2025: W50 12 km/s, 1 arcmin at 4.4 Mpc)', () => {
    expect(off(cloudDynamicalMass(2, 12, 4.4), 7727971.284662807)).toBeLessThan(1e-6);
    expect(off(dispersionMass(12, 1.279908118129175, 3), 3 * 7727971.284662807)).toBeLessThan(1e-6);
  });

  it('refuses a radius of zero', () => {
    expect(() => dynamicalMass(10, 0)).toThrow(DomainError);
    expect(GRAVITATION_KPC_KMS2).toBe(4.30091e-6);
  });
});

describe('baryonic mass', () => {
  it('adds helium to the gas and stars to both (definitions)', () => {
    const { gas, total, gasFraction } = baryonicMass(8.3e7, 6.9e5);
    expect(off(gas, 110390000)).toBeLessThan(1e-9);
    expect(off(total, 111080000)).toBeLessThan(1e-9);
    expect(off(gasFraction, 0.9937882607129996)).toBeLessThan(1e-9);
    expect(off(baryonicMass(8.3e7, 0, 1.36).gas, 112880000)).toBeLessThan(1e-9);
    expect(off(baryonicMass(8.3e7, 0, 1.4).gas, 116200000)).toBeLessThan(1e-9);
  });

  it('refuses a negative stellar mass', () => {
    expect(() => baryonicMass(1e8, -1)).toThrow(DomainError);
  });
});

describe('baryonic Tully-Fisher relation', () => {
  // McGaugh (2012), AJ 143, 40; Lelli et al. (2019), MNRAS 484, 3267 (intercept from memory); Bradford et al. (2016), ApJ 832, 11
  it.each([
    [15, 2379375, 3295727.891133281, 10484209.22767568],
    [25, 18359375, 23554236.6109427, 54868820.96877973],
    [50, 293750000, 339652266.2729123, 518397399.24335605],
    [100, 4700000000, 4897788193.684457, 4897788193.684477],
    [200, 75200000000, 70626142005.24782, 46274015311.820435],
  ])('at %d km/s', (speed, mcgaugh, lelli, bradford) => {
    expect(off(10 ** baryonicMassFromSpeed(speed, 'mcgaugh2012'), mcgaugh)).toBeLessThan(1e-6);
    expect(off(10 ** baryonicMassFromSpeed(speed, 'lelli2019'), lelli)).toBeLessThan(1e-6);
    expect(off(10 ** baryonicMassFromSpeed(speed, 'bradford2016'), bradford)).toBeLessThan(1e-6);
  });

  it('has the residual of a dark candidate (M_HI 8.3e7, W50 50, 60 degrees; definitions)', () => {
    const speed = speedFromWidth(50, 60 * DEGREE);
    expect(speed).toBeCloseTo(28.86751345948129, 9);
    const logMass = Math.log10(1.33 * 8.3e7);
    expect(tullyFisherResidual(logMass, speed, 'mcgaugh2012')).toBeCloseTo(0.5291943675026917, 6);
    expect(tullyFisherResidual(logMass, speed, 'lelli2019')).toBeCloseTo(0.4303536319848362, 6);
  });

  it('refuses a face-on disc', () => {
    expect(() => speedFromWidth(50, 0)).toThrow(DomainError);
  });
});
