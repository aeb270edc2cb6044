import { describe, expect, it } from 'vitest';
import { raDifferenceDeg, separationArcsec } from './separation-arcsec.ts';

describe('separation', () => {
  // Computed with astropy 5.2 (SkyCoord.separation), to 1e-10 degrees; the milliarcsecond is that of the rounded input.
  it.each([
    ['ordinary', 10, 20, 10.01, 20.005, 38.319191629176565],
    ['1 mas', 150, 2, 150, 2.0000002777777777, 0.0009999999995012267],
    ['across right ascension 0', 359.9999, -0.0001, 0.0001, 0.0001, 1.0182337647549302],
    ['over the pole', 0, 89.9, 180, 89.9, 719.9999999999804],
    ['antipode', 0, 0, 180, 0, 648000],
    ['near the antipode', 10, 30, 190, -29.9999, 647999.6400000001],
    ['high declination', 45, 85, 50, 85, 1568.3093978914958],
    ['M31 to M33', 10.684708, 41.26875, 23.4621, 30.659942, 53221.13189682182],
    ['a quarter', 0, 0, 90, 0, 324000],
  ])('agrees with an independent program: %s', (_, ra1, dec1, ra2, dec2, expected) => {
    expect(Math.abs(separationArcsec(ra1, dec1, ra2, dec2) - expected)).toBeLessThan(3.6e-7);
  });
  it.each([1e-3, 1e-6, 1e-9, 1e-12])('keeps 1e-12 of itself at %d degrees along a meridian', (step) => {
    const dec = 0.5 + step;
    expect(Math.abs(separationArcsec(77, 0.5, 77, dec) / ((dec - 0.5) * 3600) - 1)).toBeLessThan(1e-12);
  });
  it('keeps it across right ascension 0', () => {
    const west = 360 - 2 ** -40;
    expect(Math.abs(separationArcsec(west, 0, 2 ** -40, 0) / (2 ** -39 * 3600) - 1)).toBeLessThan(1e-12);
    expect(raDifferenceDeg(2 ** -40, west)).toBe(-(2 ** -39));
  });
});
