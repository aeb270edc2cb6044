import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { hiMassConstants } from './hi-mass-constant.ts';
import { fluxInJyHz, hiFlux, hiMass, hiMassFractionalError, hiMassFromFrequency } from './hi-mass.ts';

const off = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('HI mass', () => {
  // Roberts (1962), Giovanelli & Haynes (1988): 2.356e5 D^2 S; computed independently
  it.each([
    [1, 10, 23560000],
    [0.42, 28.8, 82074746.88],
    [0.4247, 28.8, 82993202.38080001],
    [4.84, 25, 712690000],
    [4.84, 5.5, 34494196],
    [4.84, 10.9, 135479518.24],
    [0.1, 28, 18471040],
    [2, 4.4, 9122432.000000002],
    [1, 1, 235600],
  ])('of %d Jy km/s at %d Mpc is %d solar masses', (flux, distance, mass) => {
    expect(off(hiMass(flux, distance), mass)).toBeLessThan(1e-9);
  });

  // Meyer et al. (2017), PASA 34, e052; computed with astropy 5.2
  it.each([
    [
      0.0083, 0.42, 35.7748047611735, 126642396.75483452, 124566019.47841102, 125599917.44008183, 1957.3183846429336,
      124500876.43242246,
    ],
    [
      0.05, 1, 222.28905465961708, 11641567052.337444, 10559244491.916048, 11087206716.51185, 4297.4726476439355,
      10553722429.379076,
    ],
    [
      0.2, 0.1, 980.0678868655586, 22630158961.102264, 15715388167.432129, 18858465800.918556, 329.0252495852388,
      15707169647.980307,
    ],
  ])(
    'takes the redshift factor of its velocity form at z = %d',
    (z, flux, distance, local, optical, source, jyHz, fromHz) => {
      expect(off(hiMass(flux, distance, z, 'local'), local)).toBeLessThan(1e-9);
      expect(off(hiMass(flux, distance, z, 'radio'), local)).toBeLessThan(1e-9);
      expect(off(hiMass(flux, distance, z, 'optical'), optical)).toBeLessThan(1e-9);
      expect(off(hiMass(flux, distance, z, 'source'), source)).toBeLessThan(1e-9);
      expect(off(fluxInJyHz(flux, z), jyHz)).toBeLessThan(1e-9);
      expect(off(hiMassFromFrequency(jyHz, distance), fromHz)).toBeLessThan(1e-9);
    },
  );

  // Atomic physics, M = 16 pi m_H D^2 S / (3 h nu A10); computed with astropy 5.2, to 1e-4
  it.each([
    [2.8843e-15, 49.461711935433165, 234347.79044835476],
    [2.86888e-15, 49.72756467170807, 235607.3910341979],
    [2.85e-15, 50.056987977322756, 237168.18666322445],
  ])('has the constants of A10 = %d per second', (a, perJyHz, perJyKms) => {
    expect(off(hiMassConstants(a).perJyHz, perJyHz)).toBeLessThan(1e-4);
    expect(off(hiMassConstants(a).perJyKms, perJyKms)).toBeLessThan(1e-4);
  });

  it('is undone by the flux of a mass', () => {
    expect(off(hiFlux(hiMass(0.42, 28, 0.05, 'source'), 28, 0.05, 'source'), 0.42)).toBeLessThan(1e-14);
  });

  it('doubles the distance error: 10.2 per cent at 28 Mpc is 0.089 dex', () => {
    // 200 km/s over H0 = 70 is 2.857 Mpc
    expect(hiMassFractionalError(0, 2.857 / 28) / Math.LN10).toBeCloseTo(0.0886, 3);
  });

  it('refuses a flux or a distance that is not positive, and NaN', () => {
    expect(() => hiMass(0, 10)).toThrow(DomainError);
    expect(() => hiMass(-1, 10)).toThrow(/-1/);
    expect(() => hiMass(1, 0)).toThrow(DomainError);
    expect(() => hiMass(NaN, 10)).toThrow(DomainError);
    expect(() => hiMass(1, 10, -1)).toThrow(DomainError);
    expect(() => hiMassFractionalError(-0.1, 0)).toThrow(DomainError);
  });
});

describe('the flux implied by published masses', () => {
  // [source, mass, distance, flux]; masses and distances from the abstracts, rounded there to 2-10 per cent
  it.each([
    ['AGC 229385 (Janowiecki et al. 2015, ApJ 801, 96)', 7.2e8, 25, 4.889643463497453],
    ['AGC 229384 (Janowiecki et al. 2015)', 2e8, 25, 1.3582342954159592],
    ['AGC 229383 (Janowiecki et al. 2015)', 1.2e8, 25, 0.8149405772495756],
    ['AGC 229101 (Leisman et al. 2021, AJ 162, 274)', 2e9, 105.9, 0.7569423241543766],
    ['Cloud-9 (Anand et al. 2025, ApJL)', 1e6, 4.4, 0.21923978167225577],
    ['VIRGOHI 21 (Minchin et al. 2007; Duc & Bournaud 2008)', 1e8, 16, 1.6580008488964346],
    ['J0613+52 at 270 million light-years (announced 2024, from memory)', 2e9, 82.78237632209866, 1.2387364918953907],
  ])('reproduces %s', (_source, mass, distance, flux) => {
    expect(off(hiFlux(mass, distance), flux)).toBeLessThan(1e-6);
  });

  it('of Coma P gives the masses of its three published distances (Janowiecki+2015, Anand+2018, Brunker+2019)', () => {
    const flux = hiFlux(7.2e8, 25);
    expect(off(hiMass(flux, 10.9), 136869120)).toBeLessThan(1e-9);
    expect(off(hiMass(flux, 5.5), 34848000)).toBeLessThan(1e-9);
    expect(off(hiMass(flux, 5.5), 81 * 4.3e5)).toBeLessThan(0.02); // M_HI/M* = 81, M* = 4.3e5: Brunker et al. (2019)
  });
});
