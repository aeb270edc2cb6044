import type { Page } from 'playwright-core';

/** Pictures are kept in the page under a name: they are too large to be carried out of it. */
type Kept = Record<string, { width: number; pixels: Uint32Array }>;
declare global {
  var keptPictures: Kept | undefined;
}

/**
 * Keeps what the map shows, in CSS pixels, once two frames running are the same and something is drawn.
 * @returns width of the picture, its number of pixels drawn on, and the canvases it was laid together from
 */
export function keepPicture(page: Page, name: string): Promise<{ width: number; drawn: number; canvases: number }> {
  return page.evaluate(async (as) => {
    const viewport = document.querySelector<HTMLElement>('.ol-viewport')!;
    const { width, height } = viewport.getBoundingClientRect();
    const sheet = new OffscreenCanvas(Math.round(width), Math.round(height));
    const context = sheet.getContext('2d', { willReadFrequently: true })!;
    const take = () => {
      context.clearRect(0, 0, sheet.width, sheet.height);
      for (const canvas of viewport.querySelectorAll('canvas')) {
        context.drawImage(canvas, 0, 0, sheet.width, sheet.height);
      }
      return new Uint32Array(context.getImageData(0, 0, sheet.width, sheet.height).data.buffer);
    };
    const frame = () => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done)));
    let last = take();
    for (let tries = 0; tries < 200; tries++) {
      await frame();
      const next = take();
      const drawn = next.reduce((sum, pixel) => sum + (pixel === 0 ? 0 : 1), 0);
      if (drawn > 0 && next.every((pixel, i) => pixel === last[i])) {
        (globalThis.keptPictures ??= {})[as] = { width: sheet.width, pixels: next };
        return { width: sheet.width, drawn, canvases: document.querySelectorAll('canvas').length };
      }
      last = next;
    }
    throw new Error('the map does not come to rest');
  }, name);
}

/** The leftmost pixel in which two kept pictures differ; null where they are the same. */
export function leftmostChange(page: Page, before: string, after: string): Promise<{ x: number; y: number } | null> {
  return page.evaluate(
    ([from, to]) => {
      const { width, pixels } = globalThis.keptPictures![to!]!;
      const old = globalThis.keptPictures![from!]!.pixels;
      for (let x = 0; x < width; x++) {
        for (let at = x; at < pixels.length; at += width) {
          if (old[at] !== pixels[at]) return { x, y: Math.floor(at / width) };
        }
      }
      return null;
    },
    [before, after],
  );
}
