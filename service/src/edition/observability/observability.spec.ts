import { describe, expect, it } from 'vitest';
import { airmassAt, observabilityOf } from './observability-of.ts';

const query = {
  name: 'invented dome',
  latitudeDeg: -30,
  longitudeDeg: -70,
  heightM: 2000,
  semester: '2026B',
  maximumAirmass: 1.5,
  twilightDeg: 18,
};
const target = (raDeg: number, decDeg: number) => ({
  detectionId: '01234567-89ab-4def-8123-456789abcdef',
  name: 'T',
  raDeg,
  decDeg,
});

describe('observability', () => {
  it('has the airmasses of the published table', () => {
    // Kasten & Young (1989), Applied Optics 28, 4735, table 2: 90 deg 0.9997, 30 deg 1.9939 (1.9942 from the formula), 0 deg 37.92.
    expect(airmassAt(90)).toBeCloseTo(1, 3);
    expect(airmassAt(30)).toBeCloseTo(1.994, 2);
    expect(airmassAt(0)).toBeCloseTo(37.92, 1);
  });

  it('finds a source opposite to the Sun at its best when the Sun is opposite', () => {
    // The Sun stands at right ascension 0 h at the equinox, 2026-09-23: a source at 0 h transits at midnight then.
    const { items, from, to } = observabilityOf([target(0, -30)], query);
    expect([from, to]).toEqual(['2026-08-01', '2027-01-31']);
    const off = Math.abs(Date.parse(items[0]!.transitDate!) - Date.parse('2026-09-23')) / 86_400_000;
    expect(off).toBeLessThanOrEqual(3);
    expect(items[0]!.leastAirmass).toBeCloseTo(1, 2);
  });

  it('counts the hours that spherical trigonometry gives for a night', () => {
    // On the zenith's parallel the airmass is below 1.5 (altitude 41.8) while cos H >= (sin a - sin^2 lat) / cos^2 lat.
    const [sin2, cos2] = [Math.sin(Math.PI / 6) ** 2, Math.cos(Math.PI / 6) ** 2];
    const hourAngle = Math.acos((Math.sin((41.76 * Math.PI) / 180) - sin2) / cos2);
    const expected = (2 * hourAngle * 12) / Math.PI / 1.0027;
    const { items } = observabilityOf([target(0, -30)], query);
    expect(items[0]!.bestNightHours).toBeGreaterThan(expected - 0.15);
    expect(items[0]!.bestNightHours).toBeLessThan(expected + 0.15);
  });

  it('gives nothing to what never rises, and to a place where it is never dark', () => {
    const [north] = observabilityOf([target(0, 80)], query).items;
    expect(north).toMatchObject({ hours: 0, bestNight: null, transitDate: null, leastAirmass: null });
    const summer = { ...query, latitudeDeg: 80, semester: '2026A' };
    const items = observabilityOf([target(90, 80)], summer).items;
    expect(items[0]!.hours).toBeGreaterThan(0);
    expect(items[0]!.bestNight! < '2026-03-20').toBe(true);
  });
});
