import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import {
  COLUMN_DENSITY_PER_K_KMS,
  COLUMN_DENSITY_PER_SOLAR_MASS_PC2,
  columnDensity,
  kelvinPerJansky,
} from './column-density.ts';

const off = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('column density', () => {
  it('takes 6.0574e5 K per Jy over a beam of one square arcsec (Rayleigh-Jeans)', () => {
    expect(off(kelvinPerJansky(1, 1), 605744.0111037623)).toBeLessThan(1e-6);
  });

  it('takes 1.104e24 per Jy/beam km/s over the beam in square arcsec ("1.10e24" in print)', () => {
    expect(off(columnDensity(1, 1, 1), 1.1042713322421587e24)).toBeLessThan(1e-4);
    expect(COLUMN_DENSITY_PER_K_KMS).toBe(1.823e18); // handbook
  });

  it('takes 1.248e20 for a solar mass per square parsec (constants)', () => {
    expect(off(COLUMN_DENSITY_PER_SOLAR_MASS_PC2, 1.2478735376544861e20)).toBeLessThan(1e-6);
  });

  // optically thin gas, computed with astropy 5.2
  it.each([
    [0.1, 174, 174, 0, 3.647348831556873e18, 3.647348831556873e18, 3.647348831556873e18, 0.02920916818736985],
    [0.1, 30, 30, 0, 1.2269681469357321e20, 1.2269681469357321e20, 1.2269681469357321e20, 0.9825964178231218],
    [0.42, 174, 174, 0, 1.5318865092538864e19, 1.5318865092538864e19, 1.5318865092538864e19, 0.12267850638695334],
    [0.1, 15, 25, 0.05, 3.2465577167919474e20, 3.408885602631545e20, 3.5793298827631224e20, 2.358231402775492],
  ])('of %d Jy/beam km/s in %d x %d arcsec at z = %d', (flux, major, minor, z, optical, source, radio, surface) => {
    expect(off(columnDensity(flux, major, minor, z, 'optical'), optical)).toBeLessThan(1e-4);
    expect(off(columnDensity(flux, major, minor, z, 'source'), source)).toBeLessThan(1e-4);
    expect(off(columnDensity(flux, major, minor, z, 'radio'), radio)).toBeLessThan(1e-4);
    const local = columnDensity(flux, major, minor, z, 'local');
    expect(off(local, optical / (1 + z) ** 2)).toBeLessThan(1e-9);
    // The listed surface density uses 8.008e-21 solar masses per pc^2 per cm^-2, 0.07 per cent from the constants.
    expect(off(local / COLUMN_DENSITY_PER_SOLAR_MASS_PC2, surface)).toBeLessThan(1e-3);
  });

  it('refuses a missing beam', () => {
    expect(() => columnDensity(1, 0, 30)).toThrow(DomainError);
    expect(() => columnDensity(1, NaN, 30)).toThrow(DomainError);
  });
});
