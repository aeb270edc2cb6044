import CircleStyle from 'ol/style/Circle.js';
import Fill from 'ol/style/Fill.js';
import RegularShape from 'ol/style/RegularShape.js';
import Stroke from 'ol/style/Stroke.js';
import Style from 'ol/style/Style.js';
import Text from 'ol/style/Text.js';
import type { Palette } from './palette.ts';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';

/** Radius of a mark on the screen, pixels: brighter is larger; without a magnitude small. */
export function markRadius(magnitude: number | null, isStar: boolean): number {
  if (magnitude === null) return isStar ? 2.5 : 4;
  return Math.min(9, Math.max(2.2, 2.4 + (22 - magnitude) * 0.55));
}

const DIAGONAL = Math.PI / 4;

/** Shape by wavelength: circle optical, plus infrared, chevron ultraviolet, square continuum, diamond gas, cross star. */
function shape(mark: SkyMark, radius: number, stroke: Stroke, fill: Fill | undefined) {
  const common = { stroke, ...(fill ? { fill } : {}) };
  if (mark.isStar || mark.kind === 'stars') {
    return new RegularShape({ ...common, points: 4, radius: radius + 0.5, radius2: 0, angle: DIAGONAL });
  }
  switch (mark.kind) {
    case 'infrared':
      return new RegularShape({ ...common, points: 4, radius: radius + 1, radius2: 0, angle: 0 });
    case 'ultraviolet':
      return new RegularShape({ ...common, points: 3, radius: radius + 0.6, angle: 0 });
    case 'continuum':
      return new RegularShape({ ...common, points: 4, radius: radius + 0.6, angle: DIAGONAL });
    case 'hi':
      return new RegularShape({ ...common, points: 4, radius: radius + 1.4, angle: 0 });
    default:
      return new CircleStyle({ ...common, radius });
  }
}

function colour(mark: SkyMark, palette: Palette): string {
  if (mark.agreement === 'concordant') return palette.concordant;
  if (mark.agreement === 'other') return palette.other;
  return mark.kind === 'ultraviolet' ? palette.ultraviolet : palette.none;
}

/** Velocity is told by colour AND by filling: filled agrees, thick outline disagrees, thin outline has none. */
export function markStyle(mark: SkyMark, palette: Palette): Style {
  const tone = colour(mark, palette);
  const agrees = mark.agreement === 'concordant';
  const stroke = new Stroke({ color: tone, width: mark.agreement === 'other' ? 2.2 : 1.2 });
  const fill = new Fill({ color: agrees ? tone : 'rgba(0, 0, 0, 0)' });
  const radius = markRadius(mark.magnitude, mark.isStar);
  return new Style({
    image: shape(mark, radius, stroke, fill),
    zIndex: agrees ? 3 : mark.agreement === 'other' ? 2 : 1,
  });
}

/** A ring and a label about the mark that is pointed at or chosen. */
export function litStyle(mark: SkyMark, label: string, palette: Palette, chosen: boolean): Style {
  const radius = markRadius(mark.magnitude, mark.isStar) + 5;
  return new Style({
    zIndex: 10,
    image: new CircleStyle({
      radius,
      stroke: new Stroke({ color: chosen ? palette.amber : palette.text, width: 1.6 }),
    }),
    text: new Text({
      text: label,
      font: '500 11.5px "Roboto Mono", monospace',
      textAlign: 'left',
      offsetX: radius + 6,
      offsetY: -radius - 2,
      fill: new Fill({ color: palette.text }),
      stroke: new Stroke({ color: palette.field, width: 4 }),
      overflow: true,
    }),
  });
}
