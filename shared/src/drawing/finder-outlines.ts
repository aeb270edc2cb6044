import type { DrawnDetail } from './drawn-evidence.ts';
import type { FinderField } from './finder-field.ts';
import { ellipseOutline, type PanelPoint, rayleighRadius } from './panel-plane.ts';
import { element, pathThrough, textAt } from './svg.ts';

/** Beam, error ellipses, search and neighbour circles, and the ring at the centre. */
export function finderOutlines(detail: DrawnDetail, { place, perArcsec, theme }: FinderField): string {
  const { beamArcsec: beam, positionError: error, searchRadiusArcsec, neighbourRadiusArcsec } = detail;
  const [cx, cy] = place([0, 0]);
  const outline = (points: PanelPoint[], width: number, dash?: string) =>
    element('path', {
      d: pathThrough(points.map(place), true),
      fill: 'none',
      stroke: theme.amber,
      'stroke-width': width,
      'stroke-dasharray': dash,
    });
  const circle = (radius: number, colour: string, dash: string) =>
    element('circle', {
      cx,
      cy,
      r: radius * perArcsec,
      fill: 'none',
      stroke: colour,
      'stroke-width': 1,
      'stroke-dasharray': dash,
    });
  const word = (radius: number, angleDeg: number, content: string, colour: string) => {
    const angle = (angleDeg * Math.PI) / 180;
    const [x, y] = place([radius * Math.cos(angle), radius * Math.sin(angle)]);
    return textAt(x, y, content, {
      'font-size': 10.5,
      'text-anchor': 'middle',
      fill: colour,
      stroke: theme.field,
      'stroke-width': 3,
      'paint-order': 'stroke',
    });
  };
  const ellipse = (share: number) =>
    ellipseOutline(
      error.majorArcsec * rayleighRadius(share),
      error.minorArcsec * rayleighRadius(share),
      error.angleDeg,
    );
  const parts = [
    neighbourRadiusArcsec === null
      ? ''
      : circle(neighbourRadiusArcsec, theme.concordant, '3 6') +
        word(neighbourRadiusArcsec, -128, 'neighbours', theme.concordant),
    circle(searchRadiusArcsec, theme.amber, '2 5'),
    word(searchRadiusArcsec, 52, 'search', theme.amber),
    beam
      ? outline(ellipseOutline(beam.major / 2, beam.minor / 2, beam.angleDeg), 1.2, '8 5') +
        word(beam.minor / 2, -52, 'beam', theme.amber)
      : '',
    outline(ellipse(0.9973), 1.1),
    outline(ellipse(0.6827), 1.7),
    word(error.majorArcsec * rayleighRadius(0.9973), 18, '99.7 %', theme.amber),
    element('circle', { cx, cy, r: 5, fill: 'none', stroke: theme.amber, 'stroke-width': 2 }),
  ];
  return parts.join('');
}
