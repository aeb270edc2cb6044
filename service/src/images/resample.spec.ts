import { DEGREE } from '@eremite/shared/science/constants';
import { fromIcrs } from '@eremite/shared/science/sky/from-icrs';
import { fromTangentPlane } from '@eremite/shared/science/sky/tangent-plane';
import { describe, expect, it } from 'vitest';
import { memorySource } from '../tables/bytes/byte-source.ts';
import { DEFAULT_LIMITS } from '../tables/table.ts';
import { readFitsImage } from './read-fits-image.ts';
import { resample } from './resample.ts';
import { fitsBytes, floats, tanCards } from './testing/fits-bytes.ts';

const STEP = 3.6;
const SIZE = 41;
/** An image whose values are 100 x + y of their pixels, from 1. */
const numbered = Array.from({ length: SIZE * SIZE }, (_, i) => 100 * ((i % SIZE) + 1) + Math.floor(i / SIZE) + 1);
const open = (cards: object = {}) =>
  readFitsImage(memorySource(fitsBytes({ ...tanCards(SIZE, SIZE), ...cards }, floats(numbered))), {
    ...DEFAULT_LIMITS,
    maxPixels: 1e6,
  });

describe('resample', () => {
  it('gives the image itself where the square has its pixels: east left, north up', async () => {
    const square = { raDeg: 150, decDeg: 2, halfArcsec: (STEP * SIZE) / 2, pixels: SIZE };
    const out = resample(await open(), square);
    // The first row is the northernmost, which is the last of the file.
    const flipped = Array.from({ length: SIZE }, (_, row) =>
      numbered.slice((SIZE - 1 - row) * SIZE, (SIZE - row) * SIZE),
    );
    expect([...out]).toEqual(flipped.flat());
  });

  it('turns an image whose east is right', async () => {
    const square = { raDeg: 150, decDeg: 2, halfArcsec: (STEP * SIZE) / 2, pixels: SIZE };
    const out = resample(await open({ CDELT1: 0.001 }), square);
    expect(out[0]).toBe(100 * SIZE + SIZE);
  });

  it('averages what a coarser pixel covers, and repeats what a finer one lies in', async () => {
    const image = await open();
    const centre = { raDeg: 150, decDeg: 2 };
    const mean = resample(image, { ...centre, halfArcsec: STEP * 10.5, pixels: 7 });
    expect(mean.every((value) => Number.isFinite(value))).toBe(true);
    const all = mean.reduce((sum, value) => sum + value, 0) / mean.length;
    expect(all).toBeCloseTo(2121, 3);
    const fine = resample(image, { ...centre, halfArcsec: STEP / 2.5, pixels: 16 });
    expect(new Set(fine)).toEqual(new Set([2121]));
  });

  it('has no value outside the image, and none where the projection ends', async () => {
    const image = await open();
    const out = resample(image, { raDeg: 150, decDeg: 2, halfArcsec: STEP * SIZE, pixels: 2 * SIZE });
    expect(out[0]).toBeNaN();
    expect(out[SIZE * 2 * SIZE + SIZE]).not.toBeNaN();
    const behind = resample(image, { raDeg: 330, decDeg: -2, halfArcsec: 100, pixels: 8 });
    expect(behind.every(Number.isNaN)).toBe(true);
  });

  it('has the coordinates right to a fiftieth of a pixel between those it computes, also near the pole', async () => {
    const image = await open({ CTYPE1: 'RA---ZEA', CTYPE2: 'DEC--ZEA', CRVAL2: 89.9, CDELT1: -0.05, CDELT2: 0.05 });
    const square = { raDeg: 150, decDeg: 89.9, halfArcsec: 3600, pixels: 64 };
    const out = resample(image, square);
    const step = (2 * square.halfArcsec) / square.pixels;
    let apart = 0;
    for (let i = 0; i < out.length; i++) {
      const xi = (square.halfArcsec - ((i % 64) + 0.5) * step) * (DEGREE / 3600);
      const eta = (square.halfArcsec - (Math.floor(i / 64) + 0.5) * step) * (DEGREE / 3600);
      const place = fromTangentPlane(xi, eta, 150 * DEGREE, 89.9 * DEGREE);
      const { lon, lat } = fromIcrs('icrs', place.lon, place.lat);
      const { x, y } = image.wcs.toPixel(lon, lat)!;
      const isNearEdge = [x, y].some((at) => Math.abs(at - 0.5 - Math.round(at - 0.5)) < 0.02);
      if (!isNearEdge && out[i] !== 100 * Math.round(x) + Math.round(y)) apart++;
    }
    expect(apart).toBe(0);
  });
});
