import { readFileSync } from 'node:fs';
import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { faultOf, openMemory, readAll } from '../testing/read-all.ts';
import { elementBytes } from './fits-columns.ts';

const sample = (name: string) => readFileSync(new URL(`../../../../testdata/tables/${name}`, import.meta.url));

/** A FITS file of one extension, from cards without padding and hexadecimal data. */
function fits(cards: string[], hex: string): Buffer {
  const block = (texts: string[]) => {
    const text = [...texts, 'END'].map((card) => card.padEnd(80)).join('');
    return Buffer.from(text.padEnd(Math.ceil(text.length / 2880) * 2880), 'latin1');
  };
  const data = Buffer.from(hex, 'hex');
  const primary = [
    'SIMPLE  =                    T',
    'BITPIX  =                    8',
    'NAXIS   =                    0',
  ];
  const padding = Buffer.alloc((2880 - (data.length % 2880)) % 2880);
  return Buffer.concat([block(primary), block(cards), data, padding]);
}

function bintable(forms: string[], rowBytes: number, rows: number, hex: string, more: string[] = []): Buffer {
  const columns = forms.map((form, i) => `${`TFORM${i + 1}`.padEnd(8)}= '${form}'`);
  return fits(
    [
      "XTENSION= 'BINTABLE'", 'BITPIX  = 8', 'NAXIS   = 2', `NAXIS1  = ${rowBytes}`, `NAXIS2  = ${rows}`,
      `PCOUNT  = ${Math.max(0, hex.length / 2 - rowBytes * rows)}`, 'GCOUNT  = 1', `TFIELDS = ${forms.length}`, ...columns, ...more,
    ],
    hex,
  ); // prettier-ignore
}

describe('openFits', () => {
  // Layout and physical values computed with astropy 5.2 (FITS Standard 4.0, section 7.3).
  it('reads TNULL, TSCAL, unsigned and variable-length columns', async () => {
    const bytes = sample('bintable.fits');
    expect(bytes.subarray(5760, 5792).toString('hex')).toBe(
      '4067700000000000000009a0800001f441474331000000000000000300000000',
    );
    const open = await openMemory(bytes);
    expect(open.tables[0]!.declaredRows).toBe(2);
    expect(open.tables[0]!.columns).toEqual([
      { name: 'RA', type: 'number', unit: 'deg' },
      { name: 'CZ', type: 'integer', unit: 'km/s', nullMark: '-9999' },
      { name: 'FLAG', type: 'integer' },
      { name: 'SC', type: 'number' },
      { name: 'NAME', type: 'text' },
      { name: 'SPEC', type: 'text', arraySize: '*' },
    ]);
    const { rows } = await readAll(open);
    expect(rows[0]).toEqual([187.5, 2464, 0, 20.5, 'AGC1', '1 2 3']);
    expect(rows[1]!.slice(0, 3)).toEqual([24.875, null, 65535]);
    expect(rows[1]![3]).toBeCloseTo(32.7, 12);
    expect(rows[1]!.slice(4)).toEqual([null, '4']);
  });

  it('knows the bytes of an element by its code (FITS 4.0, Table 18)', () => {
    const sizes = { L: 1, B: 1, I: 2, J: 4, K: 8, A: 1, E: 4, D: 8, C: 8, M: 16, P: 8, Q: 16 };
    for (const [code, bytes] of Object.entries(sizes)) expect(elementBytes(code, 1)).toBe(bytes);
    expect([1, 8, 9, 17].map((bits) => elementBytes('X', bits))).toEqual([1, 1, 2, 3]);
  });

  it('reads every scalar code', async () => {
    const forms = ['L', '3X', 'B', 'I', 'J', 'K', '2A', 'E', 'D', 'C', 'M'];
    const hex =
      '54' + 'a0' + 'ff' + 'fffe' + 'fffffffd' + '0020000000000001' + '4100' + '41b9999a' + '4067700000000000' +
      '3f80000040000000' + '3ff00000000000004000000000000000'; // prettier-ignore
    const { rows } = await readAll(await openMemory(bintable(forms, hex.length / 2, 1, hex)));
    expect(rows).toEqual([
      ['true', '1 0 1', 255, -2, -3, '9007199254740993', 'A', Math.fround(23.2), 187.5, '1 2', '1 2'],
    ]);
  });

  it('adds the offset of unsigned 64-bit numbers without losing a digit', async () => {
    const open = await openMemory(
      bintable(['K'], 8, 2, '7fffffffffffffff8000000000000005', ['TZERO1  = 9223372036854775808']),
    );
    expect((await readAll(open)).rows).toEqual([['18446744073709551615'], ['5']]);
  });

  it('reads vectors, empty cells, 64-bit descriptors and infinities', async () => {
    const forms = ['2I', '0J', '1QJ(2)', 'D', 'L'];
    const hex = '00010002' + '0000000000000002' + '0000000000000000' + '7ff0000000000000' + '00' + '0000000700000008';
    const { rows } = await readAll(await openMemory(bintable(forms, 29, 1, hex)));
    expect(rows).toEqual([['1 2', null, '7 8', 'Infinity', null]]);
  });

  it('reads an ASCII table', async () => {
    const open = await openMemory(sample('ascii-table.fits'));
    expect(open.tables[0]).toMatchObject({ name: 'FERNS', declaredRows: 2 });
    expect((await readAll(open)).rows).toEqual([
      ['F1', 1.5, 7],
      ['F2', -2.25, 8],
    ]);
  });

  it('reads the same from a packed file and in pieces of any size', async () => {
    const whole = await readAll(await openMemory(sample('bintable.fits')));
    expect((await readAll(await openMemory(gzipSync(sample('bintable.fits'))))).rows).toEqual(whole.rows);
    expect((await readAll(await openMemory(sample('bintable.fits'), {}, { pieceBytes: 13 }))).rows).toEqual(whole.rows);
  });

  it('delivers the rows before a break', async () => {
    const cut = sample('bintable.fits').subarray(0, 5760 + 40);
    const { rows, fault } = await readAll(await openMemory(cut));
    expect(rows).toEqual([]);
    expect(fault).toMatchObject({ code: 'truncated', rowsRead: 0 });
    const two = bintable(['D'], 8, 1000, `${'4067700000000000'.repeat(2)}00`);
    const read = await readAll(await openMemory(two.subarray(0, 5760 + 17)));
    expect(read.rows).toEqual([[187.5], [187.5]]);
    expect(read.fault).toMatchObject({ code: 'truncated', rowsRead: 2, byte: 5777 });
  });

  it.each([
    ['a billion columns', bintable(['D'], 8, 0, '', []), /TFIELDS = 1/, 'TFIELDS = 1000000000', 'too-many-columns'],
    ['columns wider than a row', bintable(['D'], 8, 0, ''), /NAXIS1 {2}= 8/, 'NAXIS1  = 4', 'bad-header'],
    ['an unknown format', bintable(['D'], 8, 0, ''), /'D'/, "'Z'", 'bad-header'],
    ['a negative size', bintable(['D'], 8, 0, ''), /NAXIS2 {2}= 0/, 'NAXIS2  = -1', 'bad-header'],
    [
      'ten gigabytes that are not there',
      bintable(['D'], 8, 0, ''),
      /NAXIS2 {2}= 0/,
      'NAXIS2  = 1250000000',
      'truncated',
    ],
  ])('refuses a header with %s', async (_, bytes, from, to, code) => {
    const text = bytes.toString('latin1').replace(/(.{80})/g, (card) => card.replace(from, to).padEnd(80).slice(0, 80));
    expect((await faultOf(Buffer.from(text, 'latin1'))).code).toBe(code);
  });

  it('refuses wrong block sizes, images alone and cells outside the heap', async () => {
    const bytes = sample('bintable.fits');
    const shifted = Buffer.concat([bytes.subarray(0, 2880), Buffer.from(' '.repeat(100)), bytes.subarray(2880)]);
    expect(await faultOf(shifted)).toMatchObject({ code: 'bad-header', byte: 2880 });
    expect((await faultOf(bytes.subarray(0, 2880))).code).toBe('not-a-table');
    const outside = Buffer.from(bytes);
    outside.writeInt32BE(99, 5760 + 32 + 24);
    const { rows, fault } = await readAll(await openMemory(outside));
    expect(rows).toHaveLength(1);
    expect(fault).toMatchObject({ code: 'bad-data', rowsRead: 1, column: 'SPEC' });
  });
});
