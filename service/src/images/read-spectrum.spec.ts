import { toOpticalCz } from '@eremite/shared/science/velocity/conventions';
import { toBarycentric } from '@eremite/shared/science/velocity/frames';
import { DEGREE } from '@eremite/shared/science/constants';
import { describe, expect, it } from 'vitest';
import { memorySource } from '../tables/bytes/byte-source.ts';
import { DEFAULT_LIMITS, TableError } from '../tables/table.ts';
import { readSpectrum } from './read-spectrum.ts';
import type { SpectrumSettings } from './spectrum.ts';
import { fitsBytes, floats } from './testing/fits-bytes.ts';

const PLACE = { raDeg: 150, decDeg: 2 };
const read = (content: string | Uint8Array, settings: SpectrumSettings = {}) =>
  readSpectrum(
    memorySource(typeof content === 'string' ? Buffer.from(content) : content),
    PLACE,
    settings,
    DEFAULT_LIMITS,
  );
const table = (head: string, line: (i: number) => string, count = 20) =>
  [head, ...Array.from({ length: count }, (_, i) => line(i))].join('\n');
const velocities = (head: string) => table(head, (i) => `${2000 - 5 * i},${i}`);

describe('readSpectrum', () => {
  it('turns a falling axis round and keeps a missing value as a gap', async () => {
    const text = table('cz (km/s),flux (Jy)', (i) => `${2000 - 5 * i},${i === 3 ? '' : i / 1000}`);
    const { czKms, flux, unit, notes } = await read(text);
    expect(czKms[0]).toBe(1905);
    expect(czKms[19]).toBe(2000);
    expect(flux[0]).toBeCloseTo(19, 9);
    expect(flux[16]).toBeNaN();
    expect(unit).toBe('mJy');
    expect(notes).toEqual(['The file does not say the frame: barycentric is assumed.']);
  });

  it('reads radio velocities of the local standard of rest as what they are', async () => {
    const { czKms } = await read(velocities('v_rad_lsrk [km/s],flux [mJy]'));
    const expected = toBarycentric('lsrk', toOpticalCz('radio', 2000), 150 * DEGREE, 2 * DEGREE);
    expect(czKms[19]).toBeCloseTo(expected, 9);
    expect(expected).not.toBeCloseTo(2000, 0);
  });

  it('reads frequencies, and goes by what a person says of frame and unit', async () => {
    const text = table('freq (MHz),spectrum', (i) => `${1410 + i * 0.02},${i}`);
    const { czKms, convention, unit, flux } = await read(text, { frame: 'heliocentric', fluxUnit: 'Jy' });
    expect(convention).toBe('frequency');
    expect(czKms[19]).toBeCloseTo(toOpticalCz('frequency', 1410), 6);
    expect([unit, flux[19]]).toEqual(['mJy', 0]);
  });

  it.each([
    ['FREQ', { CRVAL1: 1.41e9, CDELT1: 2e4, CUNIT1: 'Hz', SPECSYS: 'BARYCENT' }, toOpticalCz('frequency', 1410)],
    ['VRAD', { CRVAL1: 2e6, CDELT1: 5e3, CUNIT1: 'm/s', SPECSYS: 'BARYCENT' }, toOpticalCz('radio', 2000)],
    ['VOPT', { CRVAL1: 2000, CDELT1: 5, CUNIT1: 'km/s', SPECSYS: 'HELIOCEN' }, 2000],
    ['VELO-HEL', { CRVAL1: 2e6, CDELT1: 5e3 }, 2000],
  ])('reads a FITS array along %s', async (kind, cards, expected) => {
    const head = { BITPIX: -32, NAXIS: 3, NAXIS1: 20, NAXIS2: 1, NAXIS3: 1, CTYPE1: kind, CRPIX1: 1, BUNIT: 'JY/BEAM' };
    const values = Array.from({ length: 20 }, (_, i) => i);
    const { czKms, flux } = await read(fitsBytes({ ...head, ...cards }, floats(values)));
    const at = czKms.findIndex((v) => Math.abs(v - expected) < 1e-6);
    expect(at).toBe(kind === 'FREQ' ? 19 : 0);
    expect(flux[at]).toBe(0);
  });

  it.each<[name: string, content: string | Uint8Array, words: RegExp]>([
    ['no axis', velocities('a,b'), /velocity or a frequency/],
    ['no flux', velocities('cz (km/s),name (m)').replaceAll(/,(\d+)/g, ',x$1'), /flux density/],
    ['no unit of the flux', velocities('cz (km/s),flux'), /unit of the flux/],
    ['a topocentric axis', velocities('v_topo (km/s),flux (mJy)'), /topocentric/],
    ['too few channels', table('cz (km/s),flux (mJy)', (i) => `${2000 + i},1`, 9), /9 channels/],
    ['one velocity throughout', table('cz (km/s),flux (mJy)', () => '2000,1'), /1 channels/],
    ['a velocity beyond light', table('v_rad (km/s),flux (mJy)', (i) => `${4e5 + i},1`), /axis cannot be/],
    [
      'a FITS axis of wavelengths',
      fitsBytes(
        { BITPIX: -32, NAXIS: 1, NAXIS1: 20, CTYPE1: 'WAVE', CRVAL1: 1, CDELT1: 1, CUNIT1: 'm' },
        floats(Array.from({ length: 20 }, () => 1)),
      ),
      /no velocity/,
    ],
    [
      'a million channels by its header',
      fitsBytes({ BITPIX: -32, NAXIS: 1, NAXIS1: 1e6, CTYPE1: 'VOPT' }, floats([1])),
      /1000000 channels/,
    ],
  ])('refuses %s with one clear message', async (_name, content, words) => {
    const fault = await read(content).catch((error: unknown) => error);
    expect(fault).toBeInstanceOf(TableError);
    expect((fault as TableError).message).toMatch(words);
  });
});
