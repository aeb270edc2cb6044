import { type DrawingTheme, PAPER } from './drawing-theme.ts';
import { type DrawnEvidence, marksOf } from './drawn-evidence.ts';
import { stripBackdrop } from './strip-backdrop.ts';
import { type PlacedMark, stripLayout } from './strip-layout.ts';
import { stripSummary } from './strip-summary.ts';
import { stripZones } from './strip-zones.ts';
import { markTone } from './mark-shape.ts';
import { element, px, textAt } from './svg.ts';

export interface StripOptions {
  width?: number;
  height?: number;
  /** Angular-diameter distance to draw for, Mpc; the verdict's where absent. */
  atMpc?: number;
  theme?: DrawingTheme;
}

/** A mark of the strip: circle inside, wedge where the velocity lies beyond, stroke on the shelf. */
function stripMark({ mark, x, y, where }: PlacedMark, theme: DrawingTheme): string {
  const tone = markTone(mark, theme);
  if (where === 'shelf')
    return element('path', { d: `M${px(x)} ${px(y - 4)}v8`, stroke: tone, 'stroke-opacity': 0.65 });
  if (where !== 'inside') {
    const tip = where === 'above' ? -5 : 5;
    return element('path', { d: `M${px(x - 3)} ${px(y)}l3 ${tip}l3 ${-tip}Z`, fill: 'none', stroke: tone });
  }
  const agrees = mark.agreement === 'concordant';
  return element('circle', {
    cx: x,
    cy: y,
    r: 4,
    fill: agrees ? tone : theme.field,
    stroke: tone,
    'stroke-width': 1.5,
  });
}

/**
 * Surroundings strip of one detection: projected separation against velocity difference, with the zones and what the
 * distance error does to them.
 *
 * @returns a whole SVG document; without a usable distance one that says so
 */
export function surroundingsStripSvg(evidence: DrawnEvidence, options: StripOptions = {}): string {
  const { width = 560, height = 210, theme = PAPER } = options;
  const frame = (label: string, ...children: string[]) =>
    element(
      'svg',
      {
        xmlns: 'http://www.w3.org/2000/svg',
        width,
        height,
        viewBox: `0 0 ${width} ${height}`,
        role: 'img',
        'aria-label': label,
      },
      element('rect', { width, height, fill: theme.field }),
      ...children,
    );
  const zones = stripZones(evidence.detail, evidence.settings, options.atMpc);
  if (!zones) {
    const reason = 'Without a usable distance no projected separation can be told.';
    return frame(
      reason,
      textAt(16, height / 2, reason, { 'font-size': 12, 'font-family': theme.prose, fill: theme.muted }),
    );
  }
  const layout = stripLayout(marksOf(evidence), zones, { width, height });
  const shelf = layout.placed.filter(({ where }) => where === 'shelf').length;
  return frame(
    `Surroundings of ${evidence.detail.verdict.name}: ${stripSummary(layout)}`,
    stripBackdrop(layout, theme),
    ...layout.placed.map((one) => stripMark(one, theme)),
    textAt(layout.right, layout.floor - 4, `no velocity: ${shelf}`, {
      'font-size': 11,
      'font-family': theme.mono,
      'text-anchor': 'end',
      fill: theme.muted,
    }),
  );
}
