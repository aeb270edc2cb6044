import { describe, expect, it } from 'vitest';
import { readFitsMoc, withReadMoc } from './fits-moc.ts';

/** A FITS binary table of one column of 64-bit integers. */
function fits(cards: string[], column: string, numbers: readonly bigint[]): Buffer {
  const block = (lines: string[]) => {
    const text = [...lines, 'END'].map((line) => line.padEnd(80)).join('');
    return Buffer.from(text.padEnd(Math.ceil(text.length / 2880) * 2880), 'latin1');
  };
  const value = (keyword: string, content: string | number) =>
    `${keyword.padEnd(8)}= ${typeof content === 'string' ? `'${content.padEnd(8)}'` : String(content).padStart(20)}`;
  const primary = block([`SIMPLE  = ${'T'.padStart(20)}`, value('BITPIX', 8), value('NAXIS', 0)]);
  const head = block([
    value('XTENSION', 'BINTABLE'),
    ...Object.entries({ BITPIX: 8, NAXIS: 2, NAXIS1: 8, NAXIS2: numbers.length, PCOUNT: 0, GCOUNT: 1, TFIELDS: 1 }).map(
      ([keyword, content]) => value(keyword, content),
    ),
    value('TTYPE1', column),
    value('TFORM1', '1K'),
    ...cards,
  ]);
  const data = Buffer.alloc(Math.ceil((numbers.length * 8) / 2880) * 2880);
  numbers.forEach((number, i) => data.writeBigInt64BE(number, 8 * i));
  return Buffer.concat([primary, head, data]);
}
// Source: IVOA MOC 2.0, example of the ASCII serialisation; uniq = 4 * 4^order + cell.
const EXAMPLE = '1/1 2 4 2/12-14 21 23 25 8/';
const UNIQ = [17n, 18n, 20n, 76n, 77n, 78n, 85n, 87n, 89n];

describe('a MOC in FITS', () => {
  it('is read from NUNIQ numbers with its declared order', async () => {
    const bytes = fits(
      ["ORDERING= 'NUNIQ   '", 'MOCORDER=                    8', "COORDSYS= 'C       '"],
      'UNIQ',
      UNIQ,
    );
    expect((await readFitsMoc(bytes)).toAscii()).toBe(EXAMPLE);
  });

  it('is read from ranges at order 29, beyond what a double can hold', async () => {
    const width = 1n << 54n; // 4^27: a cell of order 2 at order 29
    const edges = [
      [4n, 15n],
      [16n, 20n],
      [21n, 22n],
      [23n, 24n],
      [25n, 26n],
    ]
      .flat()
      .map((cell) => cell * width);
    const cards = ["ORDERING= 'RANGE   '", 'MOCORD_S=                    8', "MOCDIM  = 'SPACE   '"];
    expect((await readFitsMoc(fits(cards, 'RANGE', edges))).toAscii()).toBe(EXAMPLE);
    expect((await readFitsMoc(fits([], 'RANGE', edges))).toAscii()).toBe('1/1 2 4 2/12-14 21 23 25');
    // Source: shared check value, cell of order 29 of the position 24.875, +43.475 degrees.
    const fine = await readFitsMoc(fits(cards.slice(0, 1), 'RANGE', [174350948570655285n, 174350948570655286n]));
    expect([fine.declaredOrder, fine.size]).toEqual([29, 1]);
    expect(fine.contains((24.875 * Math.PI) / 180, (43.475 * Math.PI) / 180)).toBe(true);
  });

  it.each([
    [fits(["MOCDIM  = 'TIME    '"], 'RANGE', [0n, 4n]), /region of the sky.*time/],
    [fits(["COORDSYS= 'G       '"], 'UNIQ', UNIQ), /ICRS.*"G"/],
    [fits([], 'FLUX', [1n]), /NUNIQ or RANGE.*FLUX/],
    [Buffer.from('a,b\n1,2\n'), /FITS file, found csv/],
    [Buffer.alloc(0), /empty/],
  ])('of another kind is a fault of the settings', async (bytes, message) => {
    const faults: { pointer: string; detail: string }[] = [];
    const settings = { footprint: { type: 'moc' as const, value: { fits: bytes.toString('base64') } } };
    expect((await withReadMoc(settings, faults)).footprint).toEqual({ type: 'unknown' });
    expect(faults).toEqual([{ pointer: '/footprint/value', detail: expect.stringMatching(message) }]);
  });

  it('takes the place of the file in the settings', async () => {
    const value = { fits: fits([], 'UNIQ', UNIQ).toString('base64') };
    const read = await withReadMoc({ kind: 'optical', footprint: { type: 'moc', value } }, []);
    expect(read).toEqual({ kind: 'optical', footprint: { type: 'moc', value: '1/1 2 4 2/12-14 21 23 25' } });
  });
});
