import type { DrawingTheme } from './drawing-theme.ts';
import { glyphPath, isOpenGlyph } from './mark-glyph.ts';
import type { SkyMark } from './sky-mark.ts';
import { element, px } from './svg.ts';

/** Colour of a mark: that of its velocity, ultraviolet told apart where it has none. */
export function markTone({ agreement, kind }: Pick<SkyMark, 'agreement' | 'kind'>, theme: DrawingTheme): string {
  if (agreement === 'concordant') return theme.concordant;
  if (agreement === 'other') return theme.other;
  return kind === 'ultraviolet' ? theme.ultraviolet : theme.none;
}

/** A mark as an element. Velocity is told by colour AND by filling: filled agrees, thick differs, thin has none. */
export function markShape(
  mark: Pick<SkyMark, 'agreement' | 'kind' | 'isStar'>,
  x: number,
  y: number,
  radius: number,
  theme: DrawingTheme,
): string {
  const tone = markTone(mark, theme);
  const agrees = mark.agreement === 'concordant';
  return element('path', {
    d: glyphPath(mark, radius),
    transform: `translate(${px(x)} ${px(y)})`,
    fill: agrees && !isOpenGlyph(mark) ? tone : 'none',
    stroke: tone,
    'stroke-width': mark.agreement === 'other' ? 2.2 : agrees && isOpenGlyph(mark) ? 2 : 1.2,
  });
}
