import { SCREENING_CAUTION } from '../contracts/words.ts';
import { formatDeclination, formatRightAscension } from '../science/sky/sexagesimal-format.ts';
import { type DrawingTheme, PAPER } from './drawing-theme.ts';
import { type DrawnEvidence, marksOf } from './drawn-evidence.ts';
import type { FinderField } from './finder-field.ts';
import { finderOutlines } from './finder-outlines.ts';
import { finderScale } from './finder-scale.ts';
import { hatchPattern } from './hatching.ts';
import { LABEL_SIZE, placeLabels } from './place-labels.ts';
import { markRadius } from './mark-glyph.ts';
import { markShape } from './mark-shape.ts';
import { numberText } from './measure-text.ts';
import { ARCSEC_PER_RAD, type PanelPoint, toPanel } from './panel-plane.ts';
import { SKY_LEGEND } from './sky-legend.ts';
import type { SkyMark } from './sky-mark.ts';
import { element, escapeXml, pathThrough, textAt } from './svg.ts';
import { uncoveredAreas } from './uncovered-cells.ts';

export interface FinderChartOptions {
  /** Half width of the field, arcsec; without it the search circle and the beam fill it. */
  radiusArcsec?: number;
  /** Middle of the field, arcsec on the panel (x grows to the west), where it is not the detection. */
  centre?: PanelPoint;
  /** Side of the square field, pixels. */
  size?: number;
  theme?: DrawingTheme;
  /** Begins every id of the picture: two pictures on one page must not share them. */
  idPrefix?: string;
  /** Keys of marks to name besides the likeliest candidates. */
  named?: readonly string[];
}

const HEAD = 60;
const MARGIN = 12;
/** Candidates named on the chart: as many as are likely, up to this. */
const MOST_NAMED = 6;
const LEAST_PROBABILITY = 0.01;
/** Further marks would hide each other: the brightest are drawn. */
const MOST_MARKS = 5000;

/** Radius that shows search circle and beam with some sky about them, arcsec. */
export function usualRadius({ detail }: Pick<DrawnEvidence, 'detail'>): number {
  return 1.45 * Math.max(detail.searchRadiusArcsec, (detail.beamArcsec?.major ?? 0) / 2);
}

/**
 * Finder chart of one detection: north up, east left, with compass, scale bar, beam, error ellipses, search circle,
 * objects, what was not observed, and a legend.
 *
 * @returns a whole SVG document; text is escaped, nothing is fetched
 */
export function finderChartSvg(evidence: DrawnEvidence, options: FinderChartOptions = {}): string {
  const { size = 600, theme = PAPER, idPrefix = 'finder', named = [], centre = [0, 0] } = options;
  const radius = options.radiusArcsec ?? usualRadius(evidence);
  const { verdict, distance } = evidence.detail;
  const width = size + 2 * MARGIN;
  const legend = legendRows(width, theme, idPrefix);
  const height = HEAD + size + legend.height + 34;
  const perArcsec = size / (2 * radius);
  const place = ([x, y]: PanelPoint): [number, number] => [
    MARGIN + size / 2 + (x - centre[0]) * perArcsec,
    HEAD + size / 2 - (y - centre[1]) * perArcsec,
  ];
  const field = { place, perArcsec, theme, idPrefix, left: MARGIN, top: HEAD, size };
  const clip = `${idPrefix}-field`;
  const square = { x: MARGIN, y: HEAD, width: size, height: size };
  const hatched = hatching(evidence, radius + Math.hypot(...centre), field);
  const title = `Finder chart of ${verdict.name}`;
  return element(
    'svg',
    {
      xmlns: 'http://www.w3.org/2000/svg',
      width,
      height,
      viewBox: `0 0 ${width} ${height}`,
      role: 'img',
      'aria-label': `${title}: ${radius.toFixed(0)} arcsec to each side, north up, east left`,
      'font-family': theme.mono,
    },
    element('title', {}, escapeXml(title)),
    element('defs', {}, element('clipPath', { id: clip }, element('rect', square)), hatched.definitions),
    element('rect', { width, height, fill: theme.field }),
    textAt(MARGIN, 20, verdict.name, { 'font-size': 15, 'font-weight': 600, fill: theme.text }),
    textAt(MARGIN, 36, `${formatRightAscension(verdict.raDeg, 1)} ${formatDeclination(verdict.decDeg, 0)} ICRS`, {
      'font-size': 11.5,
      fill: theme.muted,
    }),
    textAt(width - MARGIN, 20, velocityAndDistance(evidence), {
      'font-size': 11.5,
      'text-anchor': 'end',
      fill: theme.muted,
    }),
    textAt(MARGIN, 53, verdict.headline, { 'font-size': 12.5, 'font-family': theme.prose, fill: theme.text }),
    element(
      'g',
      { 'clip-path': `url(#${clip})` },
      hatched.areas,
      finderOutlines(evidence.detail, field),
      drawnMarks(evidence, field, named),
    ),
    element('rect', { ...square, fill: 'none', stroke: theme.lineStrong }),
    finderScale(radius, distance.angularMpc === null ? null : (distance.angularMpc * 1000) / ARCSEC_PER_RAD, field),
    element('g', { transform: `translate(0 ${HEAD + size + 8})` }, legend.svg),
    textAt(MARGIN, height - 10, SCREENING_CAUTION, {
      'font-size': 10.5,
      'font-family': theme.prose,
      fill: theme.muted,
    }),
  );
}

function velocityAndDistance({ detail: { verdict, distance } }: DrawnEvidence): string {
  const parts = [
    verdict.velocityKms === null ? '' : `cz ${numberText(verdict.velocityKms, 0)} km/s`,
    distance.luminosityMpc === null
      ? 'no usable distance'
      : `${distance.luminosityMpc.toFixed(1)}${distance.errorMpc === null ? '' : ` ± ${distance.errorMpc.toFixed(1)}`} Mpc`,
  ];
  return parts.filter((part) => part !== '').join(' · ');
}

function hatching(
  { detail, coverages }: DrawnEvidence,
  radius: number,
  { place, perArcsec, theme, idPrefix }: FinderField,
) {
  const areas = uncoveredAreas(coverages ?? [], detail.verdict, radius * Math.SQRT2);
  const id = (kind: string) => `${idPrefix}-hatch-${kind.replace(/\W/g, '')}`;
  const kinds = [...new Set([...areas.map(({ kind }) => kind), 'mask'])];
  const masks = detail.masks.flatMap(({ raDeg, decDeg, radiusArcsec, label }) => {
    const at = toPanel(raDeg, decDeg, detail.verdict);
    if (!at) return [];
    const [cx, cy] = place(at);
    const r = radiusArcsec * perArcsec;
    return [
      element('circle', { cx, cy, r, fill: `url(#${id('mask')})`, stroke: theme.hatch }),
      textAt(cx, cy, label, { 'font-size': 10, 'text-anchor': 'middle', fill: theme.muted }),
    ];
  });
  return {
    definitions: kinds.map((kind) => hatchPattern(id(kind), kind, theme.hatch)).join(''),
    areas: [
      ...areas.map(({ kind, cells }) =>
        element('path', {
          d: cells.map((ring) => pathThrough(ring.map(place), true)).join(''),
          fill: `url(#${id(kind)})`,
        }),
      ),
      ...masks,
    ].join(''),
  };
}

function drawnMarks(evidence: DrawnEvidence, field: FinderField, named: readonly string[]): string {
  const { place, theme, size, left, top } = field;
  const likely = new Set(
    [...evidence.detail.candidates]
      .filter(({ probability }) => probability >= LEAST_PROBABILITY)
      .sort((a, b) => b.probability - a.probability)
      .slice(0, MOST_NAMED)
      .map(({ catalogueId, rowId }) => `${catalogueId}:${rowId}`),
  );
  const inside: { mark: SkyMark; x: number; y: number }[] = [];
  for (const mark of marksOf(evidence)) {
    const at = toPanel(mark.raDeg, mark.decDeg, evidence.detail.verdict);
    if (!at) continue;
    const [x, y] = place(at);
    if (x > left - 10 && x < left + size + 10 && y > top - 10 && y < top + size + 10) inside.push({ mark, x, y });
  }
  if (inside.length > MOST_MARKS) {
    inside.sort((a, b) => (a.mark.magnitude ?? 99) - (b.mark.magnitude ?? 99)).splice(MOST_MARKS);
  }
  const shapes = inside.map(({ mark, x, y }) => markShape(mark, x, y, markRadius(mark.magnitude, mark.isStar), theme));
  const labels = placeLabels(
    inside
      .filter(({ mark }) => likely.has(mark.key) || named.includes(mark.key))
      .map(({ mark, x, y }) => ({ x, y, text: mark.name, clear: markRadius(mark.magnitude, mark.isStar) + 4 })),
    left + size,
  );
  const names = labels.map(({ x, y, text, anchor }) =>
    textAt(x, y, text, {
      'font-size': LABEL_SIZE,
      'text-anchor': anchor,
      fill: theme.text,
      stroke: theme.field,
      'stroke-width': 3,
      'paint-order': 'stroke',
    }),
  );
  return [...shapes, ...names].join('');
}

/** Id of the hatching that the legend shows. */
const legendHatch = (idPrefix: string): string => `${idPrefix}-hatch-mask`;

function legendRows(width: number, theme: DrawingTheme, idPrefix: string): { svg: string; height: number } {
  const step = (width - 2 * MARGIN) / 4;
  const rows = SKY_LEGEND.map(({ word, mark }, i) => {
    const x = MARGIN + (i % 4) * step;
    const y = 10 + Math.floor(i / 4) * 18;
    return (
      markShape(mark, x + 7, y, 4.2, theme) +
      textAt(x + 18, y + 4, word, { 'font-size': 11.5, 'font-family': theme.prose, fill: theme.muted })
    );
  });
  const y = 10 + Math.ceil(SKY_LEGEND.length / 4) * 18;
  const hatched = [
    element('rect', {
      x: MARGIN,
      y: y - 6,
      width: 14,
      height: 11,
      fill: `url(#${legendHatch(idPrefix)})`,
      stroke: theme.hatch,
    }),
    textAt(MARGIN + 18, y + 4, 'masked or not observed, by one slant a kind of catalogue', {
      'font-size': 11.5,
      'font-family': theme.prose,
      fill: theme.muted,
    }),
  ];
  return { svg: [...rows, ...hatched].join(''), height: y + 10 };
}
