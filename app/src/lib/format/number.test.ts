import { describe, expect, it } from 'vitest';
import { errorDecimals, fixed, probability, scientific, signed, significant, withError } from './number.ts';

describe('numbers on the screen', () => {
  it('keep a true minus sign, thin-space thousands and no negative zero', () => {
    expect(fixed(-12345.678, 1)).toBe('−12\u202f345.7');
    expect(fixed(-0.0004, 2)).toBe('0.00');
    expect(signed(143.2, 0)).toBe('+143');
  });

  it('never show NaN or Infinity', () => {
    for (const value of [Number.NaN, Number.POSITIVE_INFINITY, null, undefined]) {
      expect([fixed(value, 1), significant(value, 2), probability(value), withError(value, null, 1)]).toEqual(
        Array(4).fill('–'),
      );
    }
  });

  it('carry the digits their error justifies', () => {
    expect(withError(12.3412, 0.41, 1)).toBe('12.3 ± 0.4');
    expect(withError(33.52, 1.24, 1)).toBe('33.5 ± 1.2');
    expect(withError(2731.4, 38, 0)).toBe('2731 ± 38');
    expect(withError(9.2, null, 2)).toBe('9.20');
    expect(errorDecimals(0.1)).toBe(2);
  });

  it('show how near a probability is to its ends without rounding it onto them', () => {
    expect(['0.84', '0.996', '>0.999', '<0.001', '1', '0']).toEqual(
      [0.84, 0.9956, 0.99999, 0.00002, 1, 0].map(probability),
    );
  });

  it('turn to powers of ten only where digits would run out', () => {
    expect(significant(1234.5, 2)).toBe('1200');
    expect(significant(0.01234, 2)).toBe('0.012');
    expect(scientific(1.25e9, 2)).toBe('1.3\u202f×\u202f10⁹');
  });
});
