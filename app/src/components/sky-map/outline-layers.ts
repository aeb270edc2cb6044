import Feature from 'ol/Feature.js';
import Circle from 'ol/geom/Circle.js';
import LineString from 'ol/geom/LineString.js';
import MultiPolygon from 'ol/geom/MultiPolygon.js';
import Point from 'ol/geom/Point.js';
import Fill from 'ol/style/Fill.js';
import CircleStyle from 'ol/style/Circle.js';
import Stroke from 'ol/style/Stroke.js';
import Style from 'ol/style/Style.js';
import Text from 'ol/style/Text.js';
import type { Palette } from './palette.ts';
import { hatchPattern } from './palette.ts';
import { ellipseOutline, rayleighRadius, type PanelPoint } from '@eremite/shared/drawing/panel-plane';
import type { UncoveredArea } from '@eremite/shared/drawing/uncovered-cells';

/** Everything on the panel that is not an object. Radii and axes in arcsec, angles in degrees east of north. */
export interface Outlines {
  beam: { major: number; minor: number; angleDeg: number } | null;
  positionError: { majorArcsec: number; minorArcsec: number; angleDeg: number };
  searchRadiusArcsec: number;
  neighbourRadiusArcsec: number | null;
  masks: { at: PanelPoint; radiusArcsec: number; label: string }[];
  uncovered: UncoveredArea[];
  /** Beams of other HI detections. */
  otherBeams: { at: PanelPoint; major: number; minor: number; angleDeg: number }[];
}

const label = (text: string, colour: string, palette: Palette, offset: [number, number]) =>
  new Text({
    text,
    font: '500 11px "Roboto Mono", monospace',
    offsetX: offset[0],
    offsetY: offset[1],
    fill: new Fill({ color: colour }),
    stroke: new Stroke({ color: palette.field, width: 3 }),
    overflow: true,
  });

function styled(geometry: Circle | LineString | MultiPolygon | Point, ...styles: Style[]): Feature {
  const feature = new Feature(geometry);
  feature.setStyle(styles);
  return feature;
}

/** A label where a circle meets its lower right. */
function rimLabel(radius: number, text: string, colour: string, palette: Palette, angleDeg: number): Feature {
  const angle = (angleDeg * Math.PI) / 180;
  const at = [radius * Math.cos(angle), radius * Math.sin(angle)];
  return styled(new Point(at), new Style({ text: label(text, colour, palette, [0, 0]) }));
}

/** What was not observed or is hidden: hatched, each with its word. */
export function hatchedFeatures({ masks, uncovered }: Outlines, palette: Palette): Feature[] {
  const hatch = new Fill({ color: hatchPattern(palette.hatch) });
  const stroke = new Stroke({ color: palette.hatch, width: 1 });
  return [
    ...uncovered.map(({ cells, kind }) =>
      styled(
        new MultiPolygon(cells.map((ring) => [ring])),
        new Style({ fill: new Fill({ color: hatchPattern(palette.hatch, kind) }) }),
      ),
    ),
    ...masks.map(({ at, radiusArcsec, label: text }) =>
      styled(
        new Circle(at, radiusArcsec),
        new Style({ fill: hatch, stroke, text: label(text, palette.muted, palette, [0, 0]) }),
      ),
    ),
  ];
}

/** Beam, error ellipses, search and neighbour circles, and our ring at the centre. */
export function outlineFeatures(outlines: Outlines, palette: Palette): Feature[] {
  const { beam, positionError: error, searchRadiusArcsec, neighbourRadiusArcsec } = outlines;
  const line = (width: number, dash?: number[]) =>
    new Style({ stroke: new Stroke({ color: palette.amber, width, ...(dash ? { lineDash: dash } : {}) }) });
  const ellipse = (sigmas: number) =>
    new LineString(ellipseOutline(error.majorArcsec * sigmas, error.minorArcsec * sigmas, error.angleDeg));
  const features = [
    styled(ellipse(rayleighRadius(0.6827)), line(1.7)),
    styled(ellipse(rayleighRadius(0.9973)), line(1.1)),
    rimLabel(error.majorArcsec * rayleighRadius(0.9973), '99.7 %', palette.amber, palette, 18),
    styled(new Circle([0, 0], searchRadiusArcsec), line(1, [2, 5])),
    rimLabel(searchRadiusArcsec, 'search', palette.amber, palette, 52),
    styled(
      new Point([0, 0]),
      new Style({
        image: new CircleStyle({ radius: 5, stroke: new Stroke({ color: palette.amber, width: 2 }) }),
        zIndex: 9,
      }),
    ),
  ];
  if (beam) {
    features.push(
      styled(new LineString(ellipseOutline(beam.major / 2, beam.minor / 2, beam.angleDeg)), line(1.2, [8, 5])),
      rimLabel(beam.minor / 2, 'beam', palette.amber, palette, -52),
    );
  }
  if (neighbourRadiusArcsec) {
    const stroke = new Stroke({ color: palette.concordant, width: 1, lineDash: [3, 6] });
    features.push(
      styled(new Circle([0, 0], neighbourRadiusArcsec), new Style({ stroke })),
      rimLabel(neighbourRadiusArcsec, 'neighbours', palette.concordant, palette, -128),
    );
  }
  for (const { at, major, minor, angleDeg } of outlines.otherBeams) {
    const outline = ellipseOutline(major / 2, minor / 2, angleDeg, 48).map(([x, y]) => [x + at[0], y + at[1]]);
    const stroke = new Stroke({ color: palette.none, width: 1, lineDash: [6, 5] });
    features.push(styled(new LineString(outline), new Style({ stroke })));
  }
  return features;
}
