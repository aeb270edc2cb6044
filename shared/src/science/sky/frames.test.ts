import { describe, expect, it } from 'vitest';
import { ARCSECOND, DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { type SkyFrame, toIcrs } from './frames.ts';
import { fromGalactic, toGalactic } from './galactic.ts';
import { atEpoch, properMotionSignificance } from './proper-motion.ts';
import { separation } from './separation.ts';

// Source: IAU 1958 system with the Hipparcos (ESA 1997) pole; values computed with astropy 5.2; 1e-7 deg.
const GALACTIC: [name: string, ra: number, dec: number, l: number, b: number][] = [
  ['Crab', 83.633083, 22.0145, 184.55745771238233, -5.784356964188545],
  ['origin', 0, 0, 96.33728336969006, -60.188551946914465],
  ['SgrAstar', 266.416837, -29.007811, 359.9442568933212, -0.04616795336060971],
  ['M87', 187.705931, 12.391123, 283.77775608141746, 74.49115435707505],
  ['field A', 24.875, 43.475, 132.10036283999375, -18.539477985505535],
  ['southpole', 0, -90, 302.9319252554166, -27.128252414968017],
  ['inv_centre', 266.4049882865447, -28.936177761791456, 0, 0],
  ['inv_ngp', 192.85947789477606, 27.128252414968028, 0, 90],
];

describe('Galactic coordinates', () => {
  it.each(GALACTIC)('give the check value 1.gal.%s both ways', (_name, ra, dec, l, b) => {
    const there = toGalactic(ra * DEGREE, dec * DEGREE);
    expect(separation(there.lon, there.lat, l * DEGREE, b * DEGREE)).toBeLessThan(1e-7 * DEGREE);
    const back = fromGalactic(l * DEGREE, b * DEGREE);
    expect(separation(back.lon, back.lat, ra * DEGREE, dec * DEGREE)).toBeLessThan(1e-7 * DEGREE);
  });
});

describe('toIcrs', () => {
  const offsetArcsec = (frame: SkyFrame, lon: number, lat: number, ra: number, dec: number) => {
    const icrs = toIcrs(frame, lon * DEGREE, lat * DEGREE);
    return separation(icrs.lon, icrs.lat, ra * DEGREE, dec * DEGREE) / ARCSECOND;
  };

  // Source: IERS (2003) rotation, values computed with astropy 5.2; 0.1 mas.
  it.each([
    ['180_30', 180, 30, 179.99999683035296, 30.000002527777635, 13.43367212547941],
    ['24.875_43.475', 24.875, 43.475, 24.874987875895393, 43.47500003193429, 31.673568096915435],
    ['0_-60', 0, -60, 3.2132815925826116e-6, -60.000002527777326, 10.78255754577894],
  ])('gives the check value 1.fk5.%s', (_name, lon, lat, ra, dec, shiftMas) => {
    expect(offsetArcsec('fk5', lon, lat, ra, dec)).toBeLessThan(1e-4);
    expect(Math.abs(offsetArcsec('fk5', lon, lat, lon, lat) * 1000 - shiftMas)).toBeLessThan(0.1);
  });

  // Source: FK4 to ICRS at epoch B1950, values computed with astropy 5.2; 0.3 arcsec asked, met to 1 mas.
  it.each([
    ['Virgo(M87)', (12 + 28 / 60 + 19 / 3600) * 15, 12 + 40 / 60, 187.71186019896288, 12.390607081330126],
    ['GA', (13 + 20 / 60) * 15, -44, 200.73467628096424, -44.26105914998776],
    ['Shapley', 13.5 * 15, -31, 203.20597847513918, -31.25659319486073],
    ['AGC-like', 1.5 * 15, 30, 23.203382695181045, 30.256514902463937],
  ])('gives the check value 1.b1950.%s', (_name, lon, lat, ra, dec) => {
    expect(offsetArcsec('b1950', lon, lat, ra, dec)).toBeLessThan(1e-3);
  });

  it('leaves ICRS alone but for the wrap, and refuses an unknown frame', () => {
    expect(toIcrs('icrs', -1, 0.5)).toEqual({ lon: 2 * Math.PI - 1, lat: 0.5 });
    expect(() => toIcrs('ecliptic' as SkyFrame, 0, 0)).toThrow(DomainError);
  });
});

describe('atEpoch', () => {
  it('gives the check value 1.pm.barnard_linear', () => {
    // Source: definition; catalogue values of the star from memory; 1e-6 deg.
    const [lon, lat] = [269.452077 * DEGREE, 4.693365 * DEGREE];
    const moved = atEpoch(lon, lat, -798.58, 10328.12, 15.5);
    expect(Math.abs(moved.lon / DEGREE - 269.44862710148215)).toBeLessThan(1e-6);
    expect(Math.abs(moved.lat / DEGREE - 4.737833294444444)).toBeLessThan(1e-6);
    expect(separation(lon, lat, moved.lon, moved.lat) / ARCSECOND).toBeCloseTo(160.56365533668577, 3);
  });

  it('gives the check value 1.pm.threshold: 100 mas/yr over 15.5 yr is 1.55 arcsec', () => {
    const moved = atEpoch(1, 0.5, 0, 100, 15.5);
    expect(separation(1, 0.5, moved.lon, moved.lat) / ARCSECOND).toBeCloseTo(1.55, 6);
  });

  it('refuses to cross a pole and knows how significant a motion is', () => {
    expect(() => atEpoch(0, 1.5707, 0, 1e6, 1000)).toThrow(DomainError);
    expect(properMotionSignificance(3, 4, 1)).toBe(5);
    expect(() => properMotionSignificance(3, 4, 0)).toThrow(DomainError);
  });
});
