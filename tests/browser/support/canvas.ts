import type { Page } from 'playwright-core';

export interface Picture {
  readonly width: number;
  readonly height: number;
  /** Packed RGBA of each pixel, row by row. */
  readonly pixels: readonly number[];
}

/** What the map has drawn, its canvases laid over each other, in CSS pixels. */
export function mapPicture(page: Page): Promise<Picture> {
  return page.evaluate(() => {
    const viewport = document.querySelector<HTMLElement>('.ol-viewport')!;
    const { width, height } = viewport.getBoundingClientRect();
    const sheet = new OffscreenCanvas(Math.round(width), Math.round(height));
    const context = sheet.getContext('2d')!;
    for (const canvas of viewport.querySelectorAll('canvas'))
      context.drawImage(canvas, 0, 0, sheet.width, sheet.height);
    const { data } = context.getImageData(0, 0, sheet.width, sheet.height);
    return { width: sheet.width, height: sheet.height, pixels: [...new Uint32Array(data.buffer)] };
  });
}

/** The leftmost pixel in which two pictures differ; undefined where they are the same. */
export function leftmostChange(before: Picture, after: Picture): { x: number; y: number } | undefined {
  for (let x = 0; x < after.width; x++) {
    for (let y = 0; y < after.height; y++) {
      const at = y * after.width + x;
      if (before.pixels[at] !== after.pixels[at]) return { x, y };
    }
  }
  return undefined;
}

/** Pixels on which anything is drawn. */
export const drawnPixels = ({ pixels }: Picture): number => pixels.filter((pixel) => pixel !== 0).length;
