import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { designation } from './designation.ts';
import { joinDeclination, joinRightAscension, mayBeHours } from './sexagesimal-columns.ts';
import { formatDeclination, formatRightAscension } from './sexagesimal-format.ts';
import { parseAngle, parseDeclination, parseRightAscension } from './sexagesimal.ts';

// Source of the check values: IAU notation and arithmetic, computed with astropy 5.2; 1e-10 deg.
describe('parseDeclination', () => {
  it.each([
    ['-00:00:01.0', -0.0002777777777777778],
    ['-00 30 00', -0.5],
    ['+12:23:28.043', 12.391123055555555],
    ['\u221205:12:03.4', -5.200944444444445],
  ])('gives the check value 1.sexa.%s', (text, deg) => {
    expect(Math.abs(parseDeclination(text).deg - deg)).toBeLessThan(1e-10);
  });

  it.each([
    ['-0.5', -0.5],
    ['\u22120.5', -0.5],
    ['+12°23′28.043″', 12.391123055555555],
    ['+12\u00B023\u201928.043"', 12.391123055555555],
    ['-00d00m01s', -1 / 3600],
    ['−12°23′28″.043', -12.391123055555555],
    ['+12 30', 12.5],
    ['90', 90],
    ['-90:00:00', -90],
    ['1.25e1', 12.5],
    ['-  5 12 00', -5.2],
  ])('reads %j', (text, deg) => {
    expect(parseDeclination(text).deg).toBeCloseTo(deg, 10);
  });

  it.each([
    ['+91:00:00', /-90 to \+90/],
    ['95', /-90 to \+90/],
    ['+90:00:00.1', /-90 to \+90/],
    ['12h30m', /not hours/],
    ['12:60:00', /minutes must be below 60/],
    ['12.5:30:00', /only the last/],
    ['12,5', /decimal point/],
    ['', /empty/],
    ['north', /not a declination/],
    ['NaN', /not a declination/],
  ])('refuses %j and names the fault', (text, message) => {
    expect(() => parseDeclination(text)).toThrow(message);
    expect(() => parseDeclination(text)).toThrow(DomainError);
  });
});

describe('parseRightAscension', () => {
  it.each([
    ['12:30:49.42338', 187.70593075],
    ['12h30m49.42s', 187.70591666666667],
    ['23 59 59.999', 359.99999583333334],
    ['187d42m21.3s', 187.70591666666667],
    ['01 39 30', 24.875],
    ['01 39.5', 24.875],
  ])('gives the check value 1.sexa.%s', (text, deg) => {
    expect(Math.abs(parseRightAscension(text).deg - deg)).toBeLessThan(1e-10);
  });

  it.each([
    ['187.70593', 187.70593],
    ['187°42′21.3″', 187.70591666666667],
    ['12h', 180],
    ['12.5h', 187.5],
    ['187.5d', 187.5],
    ['12h30m', 187.5],
    ['12 h 30 m 00 s', 187.5],
    ['12h30', 187.5],
    ['12ʰ30ᵐ49.42ˢ', 187.70591666666667],
    ['12h30m49s.42', 187.70591666666667],
    ['1h39.5m', 24.875],
  ])('reads %j without a warning', (text, deg) => {
    const { deg: read, warnings } = parseRightAscension(text);
    expect(read).toBeCloseTo(deg, 10);
    expect(warnings).toEqual([]);
  });

  it.each([
    ['-90.5', 269.5],
    ['360', 0],
    ['24:00:00', 0],
    ['12:30:60.0', 187.75],
    ['12:30', 187.5],
    ['23:59:60', 0],
  ])('reads %j with a warning', (text, deg) => {
    const { deg: read, warnings } = parseRightAscension(text);
    expect(read).toBeCloseTo(deg, 10);
    expect(warnings.length).toBeGreaterThan(0);
  });

  // 1.sexa.reject.*: convention.
  it.each([
    ['12:60:00', /minutes must be below 60/],
    ['12:30:61', /seconds must be below 60/],
    ['25:00:00', /below 24 hours/],
    ['12 30', /hours and minutes or RA and Dec/],
    ['10.5 +41.2', /not a right ascension/],
    ['400', /0 to 360/],
    ['-200', /0 to 360/],
    ['-01:30:00', /no minus sign/],
    ['', /empty/],
    ['12:30:49:10', /not a right ascension/],
  ])('refuses %j and names the fault', (text, message) => {
    expect(() => parseRightAscension(text)).toThrow(message);
    expect(() => parseRightAscension(text)).toThrow(DomainError);
  });
});

describe('parseAngle', () => {
  it.each([
    ['0.1', 0.1],
    ['3.5′', 3.5 / 60],
    ['210 arcsec', 210 / 3600],
    ['5"', 5 / 3600],
    ['-0.5 deg', -0.5],
    ['2h', 30],
    ['0:03:30', 3.5 / 60],
    ['-00 00 10', -10 / 3600],
    ['50 mas', 50 / 3.6e6],
  ])('reads %j', (text, deg) => {
    expect(parseAngle(text).deg).toBeCloseTo(deg, 12);
  });

  it.each(['5 parsec', 'wide', ''])('refuses %j', (text) => {
    expect(() => parseAngle(text)).toThrow(DomainError);
  });
});

describe('format', () => {
  it.each([
    [24.875, 2, '01:39:30.00'],
    [359.9999999, 2, '00:00:00.00'],
    [0, 0, '00:00:00'],
    [187.70593075, 5, '12:30:49.42338'],
    [-15, 0, '23:00:00'],
  ])('writes the right ascension %d with %d digits', (deg, digits, text) => {
    expect(formatRightAscension(deg, digits)).toBe(text);
  });

  it.each([
    [-0.0002777777777777778, 1, '-00:00:01.0'],
    [43.475, 1, '+43:28:30.0'],
    [-5.2, 0, '-05:12:00'],
    [89.99999999, 1, '+90:00:00.0'],
    [12.999999999, 0, '+13:00:00'],
  ])('writes the declination %d with %d digits', (deg, digits, text) => {
    expect(formatDeclination(deg, digits)).toBe(text);
  });

  it('comes back through the parser', () => {
    for (let i = 0; i < 500; i++) {
      const ra = (i * 0.7237) % 360;
      const dec = -90 + ((i * 0.3611) % 180);
      expect(Math.abs(parseRightAscension(formatRightAscension(ra, 6)).deg - ra)).toBeLessThan(1e-8);
      expect(Math.abs(parseDeclination(formatDeclination(dec, 6)).deg - dec)).toBeLessThan(1e-9);
    }
  });
});

describe('designation', () => {
  it('is cut, not rounded, in every style', () => {
    expect(designation(24.875, 43.475)).toBe('J0139+4328');
    expect(designation(24.875, 43.475, 'seconds')).toBe('J013930+432830');
    expect(designation(187.70593075, -12.391123, 'tenths')).toBe('J123049.4-122328');
    expect(designation(359.9999, -0.4999)).toBe('J2359-0029');
  });

  it('does not lose a unit to float noise', () => {
    for (let minute = 0; minute < 1440; minute++) {
      const text = designation(minute / 4, (minute % 90) + 1 / 60);
      expect(text).toBe(
        `J${String(Math.floor(minute / 60)).padStart(2, '0')}${String(minute % 60).padStart(2, '0')}` +
          `+${String(minute % 90).padStart(2, '0')}01`,
      );
    }
  });
});

describe('split columns', () => {
  it('keep the sign of -00', () => {
    expect(joinRightAscension(1, 39, 30)).toBeCloseTo(24.875, 12);
    expect(joinDeclination('-', 0, 30, 0)).toBe(-0.5);
    expect(joinDeclination('', 43, 28, 30)).toBeCloseTo(43.475, 12);
    expect(() => joinDeclination('x', 0, 0, 0)).toThrow(DomainError);
    expect(() => joinRightAscension(1, 60, 0)).toThrow(/minutes/);
  });

  it('are asked about when a whole column may be hours', () => {
    const hours = Array.from({ length: 30 }, (_, i) => (i * 0.8) % 24);
    expect(mayBeHours(hours)).toBe(true);
    expect(mayBeHours(hours.slice(0, 20))).toBe(false);
    expect(mayBeHours([...hours, 180])).toBe(false);
  });
});
