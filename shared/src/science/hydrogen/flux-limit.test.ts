import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { fluxLimit, lineSignalToNoise } from './flux-limit.ts';
import { hiMass } from './hi-mass.ts';

const off = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('flux limit', () => {
  // radiometer statistics, computed independently
  it.each([
    [2.2, 50, 10, 6.5, 28, 0.31975772078246995, 59062576.508818336],
    [1, 50, 5, 5, 28, 0.07905694150420949, 14602639.288019136],
    [1.6, 100, 4, 5, 100, 0.16, 376960000],
  ])('at %d mJy, width %d, channel %d km/s and %d sigma', (rms, width, channel, sigmas, distance, flux, mass) => {
    expect(off(fluxLimit(rms, width, channel, sigmas), flux)).toBeLessThan(1e-9);
    expect(off(hiMass(fluxLimit(rms, width, channel, sigmas), distance), mass)).toBeLessThan(1e-9);
  });

  it('refuses a width of zero and a negative noise', () => {
    expect(() => fluxLimit(1, 0, 5, 5)).toThrow(DomainError);
    expect(() => fluxLimit(-1, 50, 5, 5)).toThrow(DomainError);
  });
});

describe('signal-to-noise of a line', () => {
  // Haynes et al. (2011, 2018), definition from memory
  it.each([
    [0.42, 50, 6.037075533048724],
    [1.34, 23, 28.39901006913683],
    [2, 450, 9.034618090908241],
  ])('of %d Jy km/s over %d km/s in 2.2 mJy is %d', (flux, width, ratio) => {
    expect(lineSignalToNoise(flux, width, 2.2)).toBeCloseTo(ratio, 9);
  });

  it('refuses a missing width', () => {
    expect(() => lineSignalToNoise(1, NaN, 2)).toThrow(DomainError);
  });
});
