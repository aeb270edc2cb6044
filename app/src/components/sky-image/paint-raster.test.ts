import { describe, expect, it } from 'vitest';
import { COLOUR_MAPS, colourTable } from './colour-maps.ts';
import { paintRaster, valueAt } from './paint-raster.ts';
import { cutsOf, sortedSample, STRETCHES, stretcher } from './stretch.ts';

const values = Float32Array.from({ length: 10_000 }, (_, i) => i);
const sorted = sortedSample(values);

describe('stretcher', () => {
  it.each(STRETCHES)('%s runs from dark to bright and never falls', (stretch) => {
    const brightness = stretcher(stretch, sorted, 99);
    const seen = [-1e6, 0, 100, 3000, 5000, 9000, 9999, 1e6].map(brightness);
    expect(seen[0]).toBe(0);
    expect(seen.at(-1)).toBe(1);
    expect([...seen].sort((a, b) => a - b)).toEqual(seen);
  });

  it('cuts as much above as below', () => expect(cutsOf(sorted, 98)).toEqual({ low: 100, high: 9900 }));
  it('asinh keeps blank sky dark and lifts what is faint above it', () => {
    // Sky of sigma 1 about 100 with one bright object.
    const sky = Float32Array.from({ length: 2001 }, (_, i) => 100 + 3 * ((i - 1000) / 1000) ** 3);
    const image = sortedSample(Float32Array.from([...sky, 5000]));
    const brightness = stretcher('asinh', image, 100);
    expect(brightness(100)).toBeLessThan(0.3);
    expect(brightness(110)).toBeGreaterThan(brightness(100) + 0.15);
    expect(stretcher('linear', image, 100)(110)).toBeLessThan(0.01);
    const blank = stretcher('asinh', sortedSample(sky), 99.5);
    expect(blank(103)).toBeLessThan(0.65);
  });
  it('shows an even image in the middle', () => {
    expect(stretcher('linear', sortedSample(new Float32Array(50).fill(7)), 99)(7)).toBe(0.5);
  });
});

/** Relative luminance after the sRGB curve. Source: WCAG 2.2. */
function luminance(table: Uint8ClampedArray, i: number): number {
  const [r, g, b] = [0, 1, 2].map((k) => {
    const c = table[3 * i + k]! / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

describe('colourTable', () => {
  it.each(COLOUR_MAPS)('%s gets lighter all the way, so that it reads without colour', (name) => {
    const table = colourTable(name, false);
    for (let i = 8; i < 256; i += 8) expect(luminance(table, i)).toBeGreaterThan(luminance(table, i - 8));
    expect([...colourTable(name, true).slice(0, 3)]).toEqual([...table.slice(-3)]);
  });
});

describe('paintRaster', () => {
  const raster = { values: Float32Array.from([1, 2, NaN, 4]), pixels: 2, halfArcsec: 10 };
  it('leaves clear what has no value', () => {
    const bytes = paintRaster(raster, { stretch: 'linear', colours: 'grey', isInverse: false, percent: 100 });
    expect([3, 7, 11, 15].map((i) => bytes[i])).toEqual([255, 255, 0, 255]);
    expect([bytes[0], bytes[12]]).toEqual([0, 255]);
  });

  it('reads the value under a place: north-east first', () => {
    expect([valueAt(raster, -5, 5), valueAt(raster, 5, 5), valueAt(raster, 5, -5)]).toEqual([1, 2, 4]);
    expect(valueAt(raster, 11, 0)).toBeNaN();
  });
});
