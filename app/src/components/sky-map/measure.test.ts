import { expect, it } from 'vitest';
import { measure, measuredText } from './measure.ts';

it('measures between two objects in arcsec and kpc', () => {
  // A tenth of a degree north at 20 Mpc: 360 arcsec, 20 000 kpc x 0.1 x pi / 180 = 34.9 kpc.
  const measured = measure({ raDeg: 40, decDeg: 10 }, { raDeg: 40, decDeg: 10.1 }, 20);
  expect(measured.arcsec).toBeCloseTo(360, 6);
  expect(measured.kpc).toBeCloseTo(34.907, 3);
  expect(measuredText(measured)).toBe('6.0′ = 34.9 kpc, PA 0°');
});

it('measures across right ascension zero, east being 90 degrees', () => {
  const measured = measure({ raDeg: 359.999, decDeg: 0 }, { raDeg: 0.001, decDeg: 0 }, null);
  expect(measured.arcsec).toBeCloseTo(7.2, 6);
  expect(measuredText(measured)).toBe('7.2″, PA 90°');
});
