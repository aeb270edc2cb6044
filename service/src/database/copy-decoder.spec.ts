import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { CopyDecoder } from './copy-decoder.ts';
import { CopyEncoder } from './copy-encoder.ts';

const COLUMNS = [
  { name: 'a', type: 'int4' },
  { name: 'b', type: 'text' },
  { name: 'c', type: 'bytea' },
  { name: 'd', type: 'float8' },
] as const;
const row = fc.tuple(
  fc.option(fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 })),
  fc.option(fc.string({ unit: 'grapheme' }).filter((text) => !text.includes('\u0000'))),
  fc.option(fc.uint8Array({ maxLength: 40 })),
  fc.option(fc.double({ noNaN: true })),
);

describe('the binary copy format', () => {
  it('gives back what was put in, however the stream is cut', () => {
    fc.assert(
      fc.property(fc.array(row, { maxLength: 20 }), fc.integer({ min: 1, max: 64 }), (rows, step) => {
        const encoder = new CopyEncoder(COLUMNS, 16);
        for (const one of rows) encoder.add(one);
        const bytes = encoder.finish();
        const decoder = new CopyDecoder(COLUMNS.map((column) => column.type));
        const read: unknown[][] = [];
        for (let at = 0; at < bytes.length; at += step) read.push(...decoder.push(bytes.slice(at, at + step)));
        expect(read).toEqual(rows);
      }),
    );
  });

  it('refuses rows of another width than expected', () => {
    const encoder = new CopyEncoder(COLUMNS.slice(0, 1));
    encoder.add([1]);
    expect(() => new CopyDecoder(['int4', 'int4']).push(encoder.finish())).toThrow('expected 2 columns');
  });
});
