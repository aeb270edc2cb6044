import type { SkyMark } from './sky-mark.ts';
import { px } from './svg.ts';

/** Radius of a mark, pixels: brighter is larger; without a magnitude small. */
export function markRadius(magnitude: number | null, isStar: boolean): number {
  if (magnitude === null) return isStar ? 2.5 : 4;
  return Math.min(9, Math.max(2.2, 2.4 + (22 - magnitude) * 0.55));
}

/**
 * Outline of a mark about the origin, as path data. Shape by wavelength: circle optical, plus infrared, triangle
 * ultraviolet, square continuum, diamond gas, slanted cross star.
 *
 * @param radius pixels
 */
export function glyphPath({ kind, isStar }: Pick<SkyMark, 'kind' | 'isStar'>, radius: number): string {
  const r = px(radius);
  if (isStar || kind === 'stars') {
    const d = px(radius * 0.71);
    return `M-${d} -${d}L${d} ${d}M${d} -${d}L-${d} ${d}`;
  }
  switch (kind) {
    case 'infrared':
      return `M-${r} 0H${r}M0 -${r}V${r}`;
    case 'ultraviolet':
      return `M0 -${r}L${px(radius * 0.87)} ${px(radius / 2)}H-${px(radius * 0.87)}Z`;
    case 'continuum': {
      const d = px(radius * 0.8);
      return `M-${d} -${d}H${d}V${d}H-${d}Z`;
    }
    case 'hi':
      return `M0 -${r}L${r} 0L0 ${r}L-${r} 0Z`;
    default:
      return `M-${r} 0a${r} ${r} 0 1 0 ${px(2 * radius)} 0a${r} ${r} 0 1 0 -${px(2 * radius)} 0Z`;
  }
}

/** Whether the shape has an inside that can be filled. */
export const isOpenGlyph = ({ kind, isStar }: Pick<SkyMark, 'kind' | 'isStar'>): boolean =>
  isStar || kind === 'stars' || kind === 'infrared';
