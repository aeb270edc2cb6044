import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { positionAngle } from './position-angle.ts';
import { separation } from './separation.ts';

const separationDeg = (ra1: number, dec1: number, ra2: number, dec2: number) =>
  separation(ra1 * DEGREE, dec1 * DEGREE, ra2 * DEGREE, dec2 * DEGREE) / DEGREE;
const angleDeg = (ra1: number, dec1: number, ra2: number, dec2: number) =>
  positionAngle(ra1 * DEGREE, dec1 * DEGREE, ra2 * DEGREE, dec2 * DEGREE) / DEGREE;

// Source: Vincenty (1975) special case of the sphere, values computed with astropy 5.2; 1e-10 deg and 1e-6 deg.
const CHECKS: [name: string, place: [number, number, number, number], separation: number, angle?: number][] = [
  ['ordinary', [10, 20, 10.01, 20.005], 0.01064421989699349, 61.98096574910766],
  ['1mas', [150, 2, 150, 2.0000002777777777], 2.7777777763922964e-7, 0],
  ['wrap0', [359.9999, -0.0001, 0.0001, 0.0001], 0.0002828427124319251, 44.999999991409624],
  ['pole', [0, 89.9, 180, 89.9], 0.19999999999999457, 3.5083599928039253e-15],
  ['antipode', [0, 0, 180, 0], 180],
  ['nearantipode', [10, 30, 190, -29.9999], 179.99990000000003, 3.4816666369976817e-9],
  ['highdec', [45, 85, 50, 85], 0.4356414994143044, 87.5095012534746],
  ['M31-M33', [10.684708, 41.26875, 23.4621, 30.659942], 14.783647749117172, 131.7919026457263],
  ['quarter', [0, 0, 90, 0], 90, 90],
];

describe('separation', () => {
  it.each(CHECKS)('gives the check value 1.sep.%s', (_name, place, expected) => {
    expect(Math.abs(separationDeg(...place) - expected)).toBeLessThan(1e-10);
  });

  it('finds 1 mas where the arccosine form returns 0 (1.sep.naive_acos_fails)', () => {
    const milliarcsecond = separationDeg(150, 2, 150, 2.0000002777777777) * 3.6e6;
    expect(milliarcsecond).toBeCloseTo(1, 6);
  });

  it.each([1e-3, 1e-6, 1e-9, 1e-12])('keeps its relative precision at %d rad', (step) => {
    const along = separation(1, 0.5, 1, 0.5 + step) / (0.5 + step - 0.5);
    expect(Math.abs(along - 1)).toBeLessThan(1e-12);
    const across = separation(1, 0, 1 + step, 0) / (1 + step - 1);
    expect(Math.abs(across - 1)).toBeLessThan(1e-12);
  });

  it('refuses what is not finite or lies beyond a pole, naming the values', () => {
    expect(() => separation(0, Number.NaN, 0, 0)).toThrow(DomainError);
    expect(() => separation(0, 0, Infinity, 0)).toThrow(DomainError);
    expect(() => separation(0, 1.6, 0, 0)).toThrow(/\(0, 1\.6\)/);
  });
});

describe('positionAngle', () => {
  const defined = CHECKS.filter((check) => check[3] !== undefined);
  it.each(defined)('gives the check value 1.sep.%s', (_name, place, _separation, expected) => {
    const difference = angleDeg(...place) - expected!;
    expect(Math.abs(difference - 360 * Math.round(difference / 360))).toBeLessThan(1e-6);
  });

  it('stays in [0, 360) and runs from north through east', () => {
    const around = [
      [10, 1],
      [11, 0],
      [10, -1],
      [9, 0],
    ].map(([ra, dec]) => angleDeg(10, 0, ra!, dec!));
    [0, 90, 180, 270].forEach((angle, i) => expect(around[i]).toBeCloseTo(angle, 10));
  });
});
