import type { DrawingTheme } from './drawing-theme.ts';
import type { StripLayout } from './strip-layout.ts';
import { edgeBand } from './strip-zones.ts';
import { element, px, textAt } from './svg.ts';

const DECADES_KPC = [1, 10, 100, 1000, 10_000];
const ANGLES: readonly (readonly [arcsec: number, text: string])[] = [
  [1, '1″'],
  [10, '10″'],
  [60, '1′'],
  [600, '10′'],
  [3600, '1°'],
  [36_000, '10°'],
];

/** Zones, axes in kpc and in angle, and what the distance error does to the zones: all of the strip but its marks. */
export function stripBackdrop(layout: StripLayout, theme: DrawingTheme): string {
  const { x, y, left, right, top, floor, zones, height } = layout;
  const box = (kpc: number, kms: number) => ({
    x: left,
    y: y(kms),
    width: Math.max(0, x(kpc) - left),
    height: y(-kms) - y(kms),
  });
  const zone = (kpc: number, kms: number, fill: string, stroke: string, dash?: string) =>
    element('rect', { ...box(kpc, kms), fill, stroke, 'stroke-opacity': 0.5, 'stroke-dasharray': dash });
  /** Objects under it go in or out of the zone within the error of the distance. */
  const unsure = (kpc: number, kms: number, colour: string) => {
    const [from, to] = edgeBand(kpc, zones.distanceFraction);
    if (x(to) - x(from) < 1) return '';
    const lines: string[] = [];
    for (let at = x(from); at <= x(to); at += 5) lines.push(`M${px(at)} ${px(y(kms))}V${px(y(-kms))}`);
    return element('path', { d: lines.join(''), fill: 'none', stroke: colour, 'stroke-opacity': 0.35 });
  };
  const label = { 'font-size': 11, 'font-family': theme.mono, fill: theme.muted };
  const word = {
    'font-size': 12,
    'font-weight': 500,
    'font-family': theme.prose,
    stroke: theme.field,
    'stroke-width': 2.5,
    'paint-order': 'stroke',
  };
  const { neighbourKpc, neighbourKms, debrisKpc, debrisKms, possibleDebrisKpc, possibleDebrisKms } = zones;
  return [
    zone(neighbourKpc, neighbourKms, theme.zoneNeighbour, theme.concordant, '3 3'),
    element('rect', {
      x: left,
      y: top,
      width: Math.max(0, x(zones.counterpartKpc) - left),
      height: floor - top,
      fill: theme.zoneCounterpart,
    }),
    zone(possibleDebrisKpc, possibleDebrisKms, 'none', theme.serious, '2 4'),
    zone(debrisKpc, debrisKms, theme.zoneDebris, theme.serious),
    unsure(neighbourKpc, neighbourKms, theme.concordant),
    unsure(debrisKpc, debrisKms, theme.serious),
    ...DECADES_KPC.filter((kpc) => kpc <= layout.toKpc).map(
      (kpc) =>
        element('path', { d: `M${px(x(kpc))} ${top}V${floor}`, stroke: theme.line, 'stroke-dasharray': '2 4' }) +
        textAt(x(kpc), height - 8, String(kpc), { ...label, 'text-anchor': kpc === 1 ? 'start' : 'middle' }),
    ),
    textAt(left - 8, height - 8, 'kpc', { ...label, 'text-anchor': 'end' }),
    ...ANGLES.flatMap(([arcsec, text]) => {
      const kpc = arcsec * zones.kpcPerArcsec;
      if (kpc < layout.fromKpc || kpc > layout.toKpc) return [];
      return [
        element('path', { d: `M${px(x(kpc))} ${top}v-5`, stroke: theme.lineStrong }) +
          textAt(x(kpc), top - 9, text, { ...label, 'text-anchor': 'middle' }),
      ];
    }),
    element('path', { d: `M${left} ${top}H${right}M${left} ${floor}H${right}`, stroke: theme.line }),
    element('path', { d: `M${left} ${px(y(0))}H${right}`, stroke: theme.lineStrong }),
    ...[neighbourKms, 0, -neighbourKms].map((kms) =>
      textAt(left - 8, y(kms) + 4, kms > 0 ? `+${kms}` : kms < 0 ? `−${-kms}` : '0', {
        ...label,
        'text-anchor': 'end',
      }),
    ),
    textAt(left - 8, top + 4, 'km/s', { ...label, 'text-anchor': 'end' }),
    x(zones.counterpartKpc) - left > 20
      ? textAt(left + 6, floor - 6, 'counterpart', { ...word, fill: theme.amber })
      : '',
    textAt(x(debrisKpc) - 6, y(-debrisKms) - 6, 'debris', { ...word, 'text-anchor': 'end', fill: theme.text }),
    textAt(x(neighbourKpc) - 6, y(neighbourKms) + 13, 'neighbours', {
      ...word,
      'text-anchor': 'end',
      fill: theme.text,
    }),
  ].join('');
}
