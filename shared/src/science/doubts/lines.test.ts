import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import {
  HYDROXYL_MHZ,
  czIfHydrogen,
  hydrogenFrequency,
  recombinationFrequency,
  redshiftIfLine,
} from './line-frequencies.ts';

describe('a line read as HI', () => {
  // z_OH = (1667.35903 / 1420.405752)(1 + z) - 1: [z, observed MHz, z of 1667, z of 1665, their separation in km/s]
  it.each([
    [0, 1420.405751768, 0.17386108013475265, 0.17248317104253452, 352.3178531332651],
    [0.01, 1406.3423284831683, 0.1855996909361004, 0.18420800275296, 355.8410316646037],
    [0.03, 1379.034710454369, 0.20907691253879546, 0.20765766617381076, 362.887388727281],
    [0.05, 1352.7673826361904, 0.2325541341414905, 0.23110732959466151, 369.9337457898917],
    [0.06, 1340.0054261962264, 0.24429274494283804, 0.24283216130508678, 373.4569243212969],
  ])('at z %d may be hydroxyl', (z, mhz, main, weak, separation) => {
    expect(hydrogenFrequency(299792.458 * z)).toBeCloseTo(mhz, 6);
    expect(redshiftIfLine(HYDROXYL_MHZ.main1667, z)).toBeCloseTo(main, 6);
    expect(redshiftIfLine(HYDROXYL_MHZ.main1665, z)).toBeCloseTo(weak, 6);
    // Both lines at one redshift: the 1665 component is read at a higher HI velocity.
    const observed1665 = HYDROXYL_MHZ.main1665 / (1 + main);
    expect(Math.abs(czIfHydrogen(observed1665) - 299792.458 * z - separation)).toBeLessThan(0.01);
  });

  it('has the ratio 1.1738610801 of the rest frequencies', () => {
    expect(redshiftIfLine(HYDROXYL_MHZ.main1667, 0) + 1).toBeCloseTo(1.1738610801347527, 9);
  });

  // Rydberg formula, to 1e-3 MHz: [n, MHz, cz if HI]
  it.each([
    [165, 1450.7163476220478, -6263.724848365022],
    [166, 1424.7336797521577, -910.6825976369985],
    [167, 1399.3678019589431, 4507.048594164306],
    [168, 1374.6005201662392, 9989.857249210472],
    [170, 1326.7921433841236, 21152.26103771602],
    [172, 1281.1753397951054, 32579.63694523042],
  ])('may be H%d alpha', (n, mhz, cz) => {
    expect(Math.abs(recombinationFrequency(n) - mhz)).toBeLessThan(1e-3);
    expect(Math.abs(czIfHydrogen(recombinationFrequency(n)) - cz)).toBeLessThan(0.25); // 1e-3 MHz is 0.22 km/s
  });

  // cz = c (f0 / f - 1), to 0.01 km/s
  it.each([
    ['GPS L3', 1381.05, 8543.179145553473],
    ['GPS L2', 1227.6, 47085.133788747655],
    ['radar', 1350, 15634.898799901172],
    ['radio astronomy band edge', 1400, 4369.636057047583],
    ['band edge', 1427, -1385.3580141089071],
    ['Galileo E6', 1278.75, 33210.03011719772],
    ['BeiDou B3', 1268.52, 35895.53405362673],
    ['GLONASS L2 centre', 1246, 41962.703861851165],
    ['radar', 1330, 20378.167323207937],
    ['radar', 1290, 30305.938651059347],
    ['GPS L5', 1176.45, 62166.76821434532],
  ])('at the frequency of %s, %d MHz', (_name, mhz, cz) => {
    expect(Math.abs(czIfHydrogen(mhz) - cz)).toBeLessThan(0.01);
    expect(hydrogenFrequency(cz)).toBeCloseTo(mhz, 6);
  });

  it('of cz 2464.4 is observed at 1408.824715 MHz (handbook)', () => {
    expect(hydrogenFrequency(2464.4)).toBeCloseTo(1408.824715, 6);
  });

  it('refuses a frequency of zero and a level that is no integer', () => {
    expect(() => czIfHydrogen(0)).toThrow(DomainError);
    expect(() => recombinationFrequency(166.5)).toThrow(DomainError);
    expect(() => hydrogenFrequency(-3e5)).toThrow(DomainError);
  });
});
