import type { FinderField } from './finder-field.ts';
import { kpcText } from './measure-text.ts';
import { roundStep } from './ruler.ts';
import { element, textAt } from './svg.ts';

/** A round angle near a quarter of the field, with how it is written. */
function barOf(radiusArcsec: number): { arcsec: number; text: string } {
  const wanted = radiusArcsec / 2;
  for (const [unit, sign] of [
    [3600, '°'],
    [60, '′'],
    [1, '″'],
  ] as const) {
    if (wanted < unit && unit > 1) continue;
    const step = roundStep(wanted / unit, 1);
    return { arcsec: step * unit, text: `${Number(step.toPrecision(3))}${sign}` };
  }
  return { arcsec: wanted, text: `${wanted}″` };
}

/**
 * Compass and scale bar.
 *
 * @param radiusArcsec half width of the field
 * @param kpcPerArcsec at the distance of the gas; null leaves the physical length out
 */
export function finderScale(radiusArcsec: number, kpcPerArcsec: number | null, field: FinderField): string {
  const { theme, left, top, size, perArcsec } = field;
  const bar = barOf(radiusArcsec);
  const length = bar.arcsec * perArcsec;
  const [x, y] = [left + size - 16 - length, top + size - 20];
  const physical = kpcPerArcsec === null ? '' : ` = ${kpcText(bar.arcsec * kpcPerArcsec)}`;
  const halo = { stroke: theme.field, 'stroke-width': 3, 'paint-order': 'stroke' };
  const [nx, ny] = [left + 46, top + 52];
  const arrow = (d: string) => element('path', { d, fill: 'none', stroke: theme.text, 'stroke-width': 1.4 });
  return [
    arrow(`M${x} ${y - 4}v8m0 -4h${length}m0 -4v8`),
    textAt(x + length / 2, y - 8, bar.text + physical, {
      'font-size': 11.5,
      'text-anchor': 'middle',
      fill: theme.text,
      ...halo,
    }),
    arrow(`M${nx} ${ny}v-30m-4 6l4 -6l4 6`),
    arrow(`M${nx} ${ny}h-30m6 -4l-6 4l6 4`),
    textAt(nx, ny - 34, 'N', {
      'font-size': 12,
      'font-weight': 600,
      'text-anchor': 'middle',
      fill: theme.text,
      ...halo,
    }),
    textAt(nx - 34, ny + 4, 'E', {
      'font-size': 12,
      'font-weight': 600,
      'text-anchor': 'end',
      fill: theme.text,
      ...halo,
    }),
  ].join('');
}
