import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parsePlainNumber } from './plain-number.ts';

const read = (text: string, decimal?: number) => {
  const bytes = Buffer.from(`x${text}x`);
  return parsePlainNumber(bytes, 1, bytes.length - 1, decimal);
};

describe('parsePlainNumber', () => {
  it('equals Number() for every double in its shortest form', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(read(String(value))).toBe(Number(String(value)));
      }),
      { numRuns: 5_000 },
    );
  });

  it('equals Number() for decimals with any digits, signs and exponents', () => {
    const decimal = fc
      .tuple(fc.constantFrom('', '+', '-'), fc.stringMatching(/^\d{1,20}(\.\d{0,20})?([eE][+-]?\d{1,3})?$/))
      .map((parts) => parts.join(''));
    fc.assert(
      fc.property(decimal, (text) => {
        expect(read(text)).toBe(Number(text));
      }),
      { numRuns: 5_000 },
    );
  });

  it.each([
    '',
    '-',
    '.',
    'e5',
    '1e',
    '1e+',
    '0x10',
    'Infinity',
    'NaN',
    '1 2',
    '1.2.3',
    '--1',
    '1,5',
    '10:20:30',
    '1d5',
  ])('takes %j for no number', (text) => {
    expect(read(text)).toBeNaN();
  });

  it('keeps the sign of a zero, which may be the sign of a declination', () => {
    expect(Object.is(read('-00'), -0)).toBe(true);
  });

  it('reads the decimal comma when told to', () => {
    expect(read('-12,5', 44)).toBe(-12.5);
    expect(read('0,12345678901234567', 44)).toBe(0.12345678901234567);
  });
});
