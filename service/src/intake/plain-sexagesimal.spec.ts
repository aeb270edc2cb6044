import { parseDeclination } from '@eremite/shared/science/sky/sexagesimal';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { plainSexagesimal } from './plain-sexagesimal.ts';

const read = (text: string) => {
  const bytes = Buffer.from(`x${text}x`);
  return plainSexagesimal(bytes, 1, bytes.length - 1);
};

describe('a plain sexagesimal cell', () => {
  it('is what the parser makes of it, to the last bit', () => {
    const two = (most: number) => fc.integer({ min: 0, max: most }).map((n) => String(n).padStart(2, '0'));
    const cell = fc.tuple(
      fc.constantFrom('', '+', '-'),
      two(89),
      two(59),
      two(59),
      fc.stringMatching(/^(\.\d{0,12})?$/),
      fc.constantFrom(':', ' '),
    );
    fc.assert(
      fc.property(cell, ([sign, first, minutes, seconds, fraction, mark]) => {
        const text = `${sign}${first}${mark}${minutes}${mark}${seconds}${fraction}`;
        expect(Object.is(read(text), parseDeclination(text).deg)).toBe(true);
      }),
    );
  });
  it('keeps the sign of minus zero', () => {
    expect(Object.is(read('-00:00:00'), -0)).toBe(true);
    // Source: IAU notation; arithmetic.
    expect(read('-00 30 00')).toBe(-0.5);
  });
  it.each([
    '',
    '12',
    '12:30',
    '12:60:00',
    '12:30:60.0',
    '12h30m49s',
    '12:30 49',
    '1234:30:00',
    '12:30:4',
    '12:3:04',
    ' 12:30:49',
    '12:30:49 ',
    '\u221205:12:03',
    '12:30:49.1e2',
  ])('"%s" is left to the parser', (text) => {
    expect(read(text)).toBeNaN();
  });
});
