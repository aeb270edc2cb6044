import type { DrawingTheme } from '@eremite/shared/drawing/drawing-theme';
import { glyphPath, isOpenGlyph, markRadius } from '@eremite/shared/drawing/mark-glyph';
import { markTone } from '@eremite/shared/drawing/mark-shape';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';

/** A mark drawn once, to be stamped wherever a mark like it stands. */
export interface Sprite {
  image: HTMLCanvasElement;
  /** Half its side, CSS pixels. */
  half: number;
  /** Radius of the mark in it, CSS pixels. */
  radius: number;
}

/** Radii are rounded to so many pixels, so that a field needs a few dozen sprites only. */
const STEP = 0.5;

/** Draws each kind of mark once: thousands of stamps cost a few milliseconds, thousands of paths many more. */
export class MarkSprites {
  private readonly drawn = new Map<string, Sprite>();
  constructor(
    private readonly theme: DrawingTheme,
    private readonly density: number,
  ) {}

  of(mark: SkyMark): Sprite {
    const radius = Math.round(markRadius(mark.magnitude, mark.isStar) / STEP) * STEP;
    const key = `${mark.kind}|${mark.isStar}|${mark.agreement}|${radius}`;
    const known = this.drawn.get(key);
    if (known) return known;
    const sprite = this.draw(mark, radius);
    this.drawn.set(key, sprite);
    return sprite;
  }

  private draw(mark: SkyMark, radius: number): Sprite {
    const half = Math.ceil(radius + 2.5);
    const image = document.createElement('canvas');
    image.width = image.height = 2 * half * this.density;
    const context = image.getContext('2d');
    if (context) {
      context.scale(this.density, this.density);
      context.translate(half, half);
      const path = new Path2D(glyphPath(mark, radius));
      const tone = markTone(mark, this.theme);
      const agrees = mark.agreement === 'concordant';
      if (agrees && !isOpenGlyph(mark)) {
        context.fillStyle = tone;
        context.fill(path);
      }
      context.strokeStyle = tone;
      context.lineWidth = mark.agreement === 'other' ? 2.2 : agrees && isOpenGlyph(mark) ? 2 : 1.2;
      context.stroke(path);
    }
    return { image, half, radius };
  }
}
