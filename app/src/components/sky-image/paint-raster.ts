import { colourTable, type ColourMap } from './colour-maps.ts';
import { sortedSample, type Stretch, stretcher } from './stretch.ts';

/** A square image about the detection, rows from the north, east left; NaN where there is nothing. */
export interface Raster {
  values: Float32Array;
  pixels: number;
  halfArcsec: number;
}

export interface Look {
  stretch: Stretch;
  colours: ColourMap;
  isInverse: boolean;
  /** Share of the values between the cuts, per cent. */
  percent: number;
}

/** Red, green, blue and opacity of each pixel; clear where there is no value. */
export function paintRaster({ values }: Pick<Raster, 'values'>, look: Look): Uint8ClampedArray<ArrayBuffer> {
  const table = colourTable(look.colours, look.isInverse);
  const brightness = stretcher(look.stretch, sortedSample(values), look.percent);
  const bytes = new Uint8ClampedArray(values.length * 4);
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    if (Number.isNaN(value)) continue;
    const at = 3 * Math.round(255 * brightness(value));
    bytes[4 * i] = table[at]!;
    bytes[4 * i + 1] = table[at + 1]!;
    bytes[4 * i + 2] = table[at + 2]!;
    bytes[4 * i + 3] = 255;
  }
  return bytes;
}

/** The same as a canvas, or undefined where the browser gives none. */
export function rasterCanvas(raster: Raster, look: Look): HTMLCanvasElement | undefined {
  const canvas = document.createElement('canvas');
  canvas.width = canvas.height = raster.pixels;
  const context = canvas.getContext('2d');
  if (!context) return undefined;
  context.putImageData(new ImageData(paintRaster(raster, look), raster.pixels), 0, 0);
  return canvas;
}

/** The value at a place of the panel, arcsec with west positive; NaN outside. */
export function valueAt({ values, pixels, halfArcsec }: Raster, x: number, y: number): number {
  const col = Math.floor(((x + halfArcsec) / (2 * halfArcsec)) * pixels);
  const row = Math.floor(((halfArcsec - y) / (2 * halfArcsec)) * pixels);
  return col < 0 || row < 0 || col >= pixels || row >= pixels ? NaN : values[row * pixels + col]!;
}
