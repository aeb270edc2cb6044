import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { offsetBy } from './offset.ts';
import { positionAngle } from './position-angle.ts';
import { separation } from './separation.ts';
import { fromTangentPlane, toTangentPlane } from './tangent-plane.ts';

// Source: Calabretta & Greisen (2002) A&A 395, 1077, section 5.1.3; values computed with astropy.wcs; 1e-9 deg.
const FORWARD: [name: string, place: [number, number, number, number], xi: number, eta: number][] = [
  ['field', [150.2163, 2.3009, 150.1163, 2.2009], 0.09991962986925687, 0.1000036022589389],
  ['ra0', [359.95, -0.5, 0.05, -0.3], -0.09999690305021651, -0.20000157383221062],
  ['nearpole', [10, 89.9, 200, 89.5], 0.01736575710790167, 0.5985025455408763],
  ['wide20deg', [20, 45, 0, 30], 14.915775084100757, 17.277690701461186],
];
const INVERSE: [name: string, plane: [number, number, number, number], ra: number, dec: number][] = [
  ['ra0', [0.1, -0.2, 0.05, -0.3], 0.15000309702503223, -0.4999984261421939],
  ['nearpole', [1, 0.2, 120, 89.5], 193.30068904982096, 88.95607656405686],
  ['5arcmin', [0.08333333333333333, -0.08333333333333333, 188, 20.4], 188.08886142773207, 20.316644288216366],
];
const inRadians = (degrees: [number, number, number, number]) =>
  degrees.map((d) => d * DEGREE) as [number, number, number, number];

describe('toTangentPlane', () => {
  it.each(FORWARD)('gives the check value 1.tan.%s', (_name, place, xi, eta) => {
    const plane = toTangentPlane(...inRadians(place))!;
    expect(Math.abs(plane.xi / DEGREE - xi)).toBeLessThan(1e-9);
    expect(Math.abs(plane.eta / DEGREE - eta)).toBeLessThan(1e-9);
  });

  it('is undefined at and beyond 90 degrees (1.tan.behind)', () => {
    expect(toTangentPlane(100 * DEGREE, 0, 0, 0)).toBeUndefined();
    expect(toTangentPlane(90 * DEGREE, 0, 0, 0)).toBeUndefined();
    expect(toTangentPlane(89.99 * DEGREE, 0, 0, 0)).toBeDefined();
  });
});

describe('fromTangentPlane', () => {
  it.each(INVERSE)('gives the check value 1.taninv.%s', (_name, plane, ra, dec) => {
    const place = fromTangentPlane(...inRadians(plane));
    expect(Math.abs(place.lon / DEGREE - ra)).toBeLessThan(1e-9);
    expect(Math.abs(place.lat / DEGREE - dec)).toBeLessThan(1e-9);
  });

  it('brings back what toTangentPlane sent', () => {
    const { xi, eta } = toTangentPlane(0.01, -1.55, 6.2, -1.5)!;
    const back = fromTangentPlane(xi, eta, 6.2, -1.5);
    expect(separation(back.lon, back.lat, 0.01, -1.55)).toBeLessThan(1e-14);
  });
});

describe('offsetBy', () => {
  it.each([
    [1, 0.3, 2, 0.1],
    [0.001, -1.5, 5.5, 1.2],
    [6.28, 0, 1.6, 1e-9],
  ])('goes the given way from (%d, %d)', (lon, lat, angle, distance) => {
    const end = offsetBy(lon, lat, angle, distance);
    expect(separation(lon, lat, end.lon, end.lat) / distance).toBeCloseTo(1, 6);
    expect(positionAngle(lon, lat, end.lon, end.lat)).toBeCloseTo(angle, 6);
  });
});
