import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { memorySource } from '../tables/bytes/byte-source.ts';
import { DEFAULT_LIMITS, TableError } from '../tables/table.ts';
import { readFitsImage } from './read-fits-image.ts';
import { fitsBytes, floats, tanCards } from './testing/fits-bytes.ts';

const LIMITS = { ...DEFAULT_LIMITS, maxPixels: 1e6 };
const read = (bytes: Uint8Array) => readFitsImage(memorySource(bytes), LIMITS);

const VALUES = [1, 2, 3, 4, 5, NaN, 7, 8, 9, 10, 11, 12];
const GOOD = fitsBytes({ ...tanCards(4, 3), BUNIT: 'Jy/beam', BMAJ: 0.01, BMIN: 0.005 }, floats(VALUES));

const without = (...keys: string[]) =>
  Object.fromEntries(Object.entries(tanCards(4, 3)).filter(([key]) => !keys.includes(key)));

describe('readFitsImage', () => {
  it('reads values, place, scale, unit and beam', async () => {
    const { facts, values } = await read(GOOD);
    expect([...values]).toEqual(VALUES);
    expect(facts).toMatchObject({ width: 4, height: 3, unit: 'Jy/beam', frame: 'icrs', projection: 'TAN' });
    expect(facts.raDeg).toBeCloseTo(150, 9);
    expect(facts.decDeg).toBeCloseTo(2, 9);
    expect(facts.pixelArcsec).toBeCloseTo(3.6, 6);
    expect(facts.reachArcsec).toBeCloseTo(3.6 * 2.5, 5);
    expect(facts.beam).toEqual({ majorArcsec: 36, minorArcsec: 18, angleDeg: 0 });
  });

  it('reads the same from a gzipped file', async () => {
    expect([...(await read(gzipSync(GOOD))).values]).toEqual(VALUES);
  });

  it.each<[name: string, bytes: Buffer, code: string, words: RegExp]>([
    ['a header without coordinates', fitsBytes(without('CTYPE1'), floats(VALUES)), 'unsupported', /no celestial coord/],
    ['one axis', fitsBytes({ BITPIX: -32, NAXIS: 1, NAXIS1: 12 }, floats(VALUES)), 'unsupported', /one axis/],
    [
      'a cube',
      fitsBytes({ ...tanCards(4, 3), NAXIS: 3, NAXIS3: 2 }, floats([...VALUES, ...VALUES])),
      'unsupported',
      /4 × 3 × 2/,
    ],
    ['NaN only', fitsBytes(tanCards(4, 3), floats(VALUES.map(() => NaN))), 'bad-data', /No pixel/],
    [
      'a billion pixels by its header',
      fitsBytes(tanCards(40_000, 25_000), floats(VALUES)),
      'too-large',
      /40000 × 25000/,
    ],
    ['an impossible BITPIX', fitsBytes({ ...tanCards(4, 3), BITPIX: 24 }, floats(VALUES)), 'bad-header', /BITPIX/],
    ['BSCALE 0', fitsBytes({ ...tanCards(4, 3), BSCALE: 0 }, floats(VALUES)), 'bad-header', /BSCALE/],
    ['truncated data', fitsBytes(tanCards(400, 30), floats(VALUES)), 'truncated', /breaks off/],
    ['truncated packed data', gzipSync(fitsBytes(tanCards(400, 300), floats(VALUES))), 'truncated', /breaks off/],
    [
      'a singular matrix',
      fitsBytes({ ...tanCards(4, 3), CDELT2: 0 }, floats(VALUES)),
      'bad-header',
      /singular|cannot be/,
    ],
    ['a latitude beyond the pole', fitsBytes({ ...tanCards(4, 3), CRVAL2: 95 }, floats(VALUES)), 'bad-header', /pole/],
    ['no pixel steps', fitsBytes(without('CDELT1'), floats(VALUES)), 'bad-header', /pixel steps/],
    ['no reference pixel', fitsBytes(without('CRPIX2'), floats(VALUES)), 'bad-header', /CRPIX2/],
    ['an odd unit of angle', fitsBytes({ ...tanCards(4, 3), CUNIT1: 'm' }, floats(VALUES)), 'bad-header', /CUNIT1/],
    ['an odd equinox', fitsBytes({ ...without('RADESYS'), EQUINOX: 1975 }, floats(VALUES)), 'bad-header', /1975/],
    ['another format', Buffer.from('not an image at all'), 'unsupported', /FITS/],
    ['an empty file', Buffer.alloc(0), 'empty', /empty/],
  ])('refuses %s with one clear message', async (_name, bytes, code, words) => {
    const fault = await read(bytes).then(
      () => undefined,
      (error: unknown) => error,
    );
    expect(fault).toBeInstanceOf(TableError);
    expect((fault as TableError).code).toBe(code);
    expect((fault as TableError).message).toMatch(words);
    expect((fault as TableError).mend).not.toBe('');
  });

  it('says that swapped bytes look swapped', async () => {
    const swapped = Buffer.from(
      floats([100.5, 200.25, 300.125, 4e3, 5.5, 6.25, 7.1, 8.2, 9.3, 10.4, 11.5, 12.6]),
    ).swap32();
    const { facts } = await read(fitsBytes(tanCards(4, 3), swapped));
    expect(facts.notes.join()).toMatch(/wrong order/);
    expect((await read(GOOD)).facts.notes.join()).not.toMatch(/wrong order/);
  });

  it('refuses every shortened file with its own error, never another', async () => {
    for (let length = 0; length < GOOD.length; length += 97) {
      const fault = await read(GOOD.subarray(0, length)).catch((error: unknown) => error);
      // What is missing of the padding after the last value is missed by no one.
      if (length < 2880 + VALUES.length * 4) expect(fault).toBeInstanceOf(TableError);
    }
  });
});
