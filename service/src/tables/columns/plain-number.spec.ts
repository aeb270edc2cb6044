import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formOfLast, parsePlainNumber } from './plain-number.ts';
import { SPELLED, writtenText } from './written-form.ts';

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

describe('the form of a number', () => {
  const rewritten = (text: string, decimal?: number) => {
    const value = read(text, decimal);
    return formOfLast() === SPELLED ? undefined : writtenText(value, formOfLast());
  };

  it('gives the text back, or says that it cannot', () => {
    const written = fc
      .tuple(fc.constantFrom('', '+', '-'), fc.stringMatching(/^\d{0,20}(\.\d{0,20})?([eE][+-]?\d{1,3})?$/))
      .map((parts) => parts.join(''));
    fc.assert(
      fc.property(written, (text) => {
        const value = read(text);
        if (!Number.isNaN(value)) expect([undefined, text]).toContain(rewritten(text));
      }),
      { numRuns: 20_000 },
    );
  });

  it('knows what catalogues print', () => {
    const printed = fc.tuple(fc.double({ min: -1e6, max: 1e6, noNaN: true }), fc.nat(8)).map(([x, n]) => x.toFixed(n));
    fc.assert(
      fc.property(printed, (text) => void expect(rewritten(text)).toBe(text)),
      { numRuns: 5_000 },
    );
    for (const text of [
      '97.00000',
      '-0.50',
      '-0.0',
      '-0',
      '0.000',
      '+41.2700',
      '120',
      '2.150E+01',
      '-7.0e-17',
      '1.0E+100',
    ])
      expect(rewritten(text), text).toBe(text);
    expect(rewritten('12,50', 44)).toBe('12,50');
  });

  it('leaves to the text itself what no form gives back', () => {
    for (const text of ['.5', '5.', '007.5', '+5', '1e5', '1.5E3', '1.50E+003', '12.5E+01', '0.12345678901234567890'])
      expect(rewritten(text), text).toBeUndefined();
  });
});
