import { toPanel } from '@eremite/shared/drawing/panel-plane';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';
import type { PanelView } from './frame.tsx';
import type { MarkSprites, Sprite } from './mark-sprites.ts';

/** What lies on top: agreeing velocities over others, these over none. */
const RANK = { none: 0, other: 1, concordant: 2 } as const;

/** The marks of one panel, placed once; drawing and pointing then are plain loops over arrays. */
export class MarkField {
  readonly marks: readonly SkyMark[];
  private readonly x: Float64Array;
  private readonly y: Float64Array;
  private readonly places = new Map<string, number>();

  constructor(marks: readonly SkyMark[], centre: { raDeg: number; decDeg: number }) {
    this.marks = [...marks].sort((a, b) => RANK[a.agreement] - RANK[b.agreement]);
    this.x = new Float64Array(marks.length);
    this.y = new Float64Array(marks.length);
    this.marks.forEach(({ key, raDeg, decDeg }, i) => {
      const at = toPanel(raDeg, decDeg, centre);
      this.x[i] = at ? at[0] : NaN;
      this.y[i] = at ? at[1] : NaN;
      this.places.set(key, i);
    });
  }

  /** Where a mark stands, arcsec on the panel; undefined if the panel has none of that key. */
  find(key: string | null): { mark: SkyMark; x: number; y: number } | undefined {
    const i = key === null ? undefined : this.places.get(key);
    return i === undefined || Number.isNaN(this.x[i]!)
      ? undefined
      : { mark: this.marks[i]!, x: this.x[i]!, y: this.y[i]! };
  }

  /** Stamps every mark in view. @returns how many */
  draw(
    context: CanvasRenderingContext2D,
    { centre, resolution, width, height }: PanelView,
    sprites: MarkSprites,
  ): number {
    let drawn = 0;
    for (let i = 0; i < this.marks.length; i++) {
      const px = width / 2 + (this.x[i]! - centre[0]) / resolution;
      const py = height / 2 - (this.y[i]! - centre[1]) / resolution;
      // Written so that a mark without a place (NaN) is left out.
      if (!(px > -12 && px < width + 12 && py > -12 && py < height + 12)) continue;
      const { image, half }: Sprite = sprites.of(this.marks[i]!);
      context.drawImage(image, px - half, py - half, 2 * half, 2 * half);
      drawn++;
    }
    return drawn;
  }

  /** Key of the mark nearest to a place on the panel, the topmost of equals; null beyond the tolerance. All in arcsec. */
  nearest(x: number, y: number, tolerance: number): string | null {
    let best = -1;
    let least = tolerance * tolerance;
    for (let i = 0; i < this.marks.length; i++) {
      const dx = this.x[i]! - x;
      const dy = this.y[i]! - y;
      const distance = dx * dx + dy * dy;
      if (distance <= least) [best, least] = [i, distance];
    }
    return best < 0 ? null : this.marks[best]!.key;
  }
}
