import { readdirSync, readFileSync } from 'node:fs';
import { gzipSync } from 'node:zlib';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { checkSound } from './check-sound.ts';

/** Set by the long test: how many times more inputs are tried. */
const LONG = process.env['EREMITE_LONG'] ? 60 : 1;
const RUNS = 150 * LONG;
const TIME_LIMIT = 60_000 * LONG;

const folder = new URL('../../../../testdata/tables/', import.meta.url);
const samples = readdirSync(folder)
  .filter((name) => name !== 'README.md')
  .map((name) => ({ name, bytes: readFileSync(new URL(name, folder)) }));
samples.push({
  name: 'a packed table',
  bytes: gzipSync(samples.find(({ name }) => name === 'identifiers-ragged.csv')!.bytes),
});

const LIMITS = { maxLineLength: 20_000, maxCellLength: 10_000, maxHeadBytes: 100_000, maxColumns: 200 };

/** What damages the readers most: separators, markup, numbers that promise much. */
const TOKENS = [
  '"', ',', ';', '\t', '\n', '\r', '#', '|', '\0', '<', '>', '</', '<TD>', '</TR>', '<!--', ']]>', '<![CDATA[', '&#0;', '&lt;',
  '<!ENTITY', 'href="x"', '99999999999', '-1', '1e999', '0x', "'", '=', 'NAXIS2  = 99999999', '\xff', '\xef\xbb\xbf', '{', '[', '?=',
  '\u00e9', ' '.repeat(90), '-'.repeat(30),
]; // prettier-ignore

const edit = fc.oneof(
  fc.record({ kind: fc.constant('insert' as const), at: fc.double({ min: 0, max: 1, noNaN: true }), text: fc.constantFrom(...TOKENS) }),
  fc.record({ kind: fc.constant('write' as const), at: fc.double({ min: 0, max: 1, noNaN: true }), bytes: fc.uint8Array({ minLength: 1, maxLength: 8 }) }),
  fc.record({ kind: fc.constant('cut' as const), at: fc.double({ min: 0, max: 1, noNaN: true }), length: fc.nat(200) }),
  fc.record({ kind: fc.constant('repeat' as const), at: fc.double({ min: 0, max: 1, noNaN: true }), length: fc.nat(200) }),
); // prettier-ignore

type Edit = typeof edit extends fc.Arbitrary<infer Value> ? Value : never;

function apply(bytes: Buffer, { at, ...change }: Edit): Buffer {
  const place = Math.floor(at * bytes.length);
  const before = bytes.subarray(0, place);
  const after = bytes.subarray(place);
  if (change.kind === 'insert') return Buffer.concat([before, Buffer.from(change.text, 'latin1'), after]);
  if (change.kind === 'write') return Buffer.concat([before, change.bytes, after.subarray(change.bytes.length)]);
  if (change.kind === 'cut') return Buffer.concat([before, after.subarray(change.length)]);
  return Buffer.concat([before, after.subarray(0, change.length), after]);
}

describe('every reader', () => {
  it(
    'ends in rows or a clear error for random bytes, also behind the marks of each format',
    async () => {
      const starts = [
        '',
        '\x1f\x8b',
        '\x1f\x8b\x08\0\0\0\0\0\0\x03',
        'SIMPLE  =',
        '<VOTABLE>',
        '# %ECSV 1.0\n# datatype:\n',
        '|a|b|\n',
        '\ufeff',
      ];
      const input = fc.tuple(fc.constantFrom(...starts), fc.uint8Array({ maxLength: 400 }));
      await fc.assert(
        fc.asyncProperty(input, async ([start, bytes]) => {
          await checkSound(Buffer.concat([Buffer.from(start, 'latin1'), bytes]), LIMITS);
        }),
        { numRuns: RUNS * 4 },
      );
    },
    TIME_LIMIT,
  );

  it.each(samples)(
    'ends in rows or a clear error when $name is damaged',
    async ({ bytes }) => {
      await fc.assert(
        fc.asyncProperty(fc.array(edit, { minLength: 1, maxLength: 4 }), async (edits) => {
          await checkSound(edits.reduce(apply, bytes), LIMITS);
        }),
        { numRuns: RUNS },
      );
    },
    TIME_LIMIT,
  );

  it.each(samples)(
    'never gives more rows when $name is cut off, wherever that is',
    async ({ bytes }) => {
      const whole = await checkSound(bytes);
      expect(whole.code).toBeUndefined();
      // FITS files are mostly padding: every place near the ends of their blocks, and some between.
      for (let end = 0; end < bytes.length; end += bytes.length > 4000 && LONG === 1 && end % 2880 > 200 ? 23 : 1) {
        const { rows, format } = await checkSound(bytes.subarray(0, end));
        // A head cut off early may read as a table of another kind, one word a line.
        if (format === whole.format) expect(rows).toBeLessThanOrEqual(whole.rows + 1);
      }
    },
    TIME_LIMIT,
  );
});
