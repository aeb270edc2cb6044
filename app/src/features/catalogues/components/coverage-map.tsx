import { cellBoundary } from '@eremite/shared/science/sky/healpix';
import { Moc } from '@eremite/shared/science/sky/moc';
import { useMemo } from 'react';
import { graticule } from '#components/sky-chart/graticule.ts';
import { chooseProjection } from '#components/sky-chart/project-sky.ts';

const RAD = Math.PI / 180;
const MOST_CELLS = 4000;

interface Outline {
  corners: { raDeg: number; decDeg: number }[];
}

/** Cells of the region, coarsened until few enough to draw. */
function outlines(text: string): Outline[] {
  const region = Moc.parse(text);
  const cells: Outline[] = [];
  const order = (() => {
    let at = Math.min(region.order, 10);
    while (at > 3 && region.size / 4 ** (region.order - at) > MOST_CELLS) at--;
    return at;
  })();
  const width = 4 ** (region.order - order);
  const seen = new Set<number>();
  for (let i = 0; i < region.ranges.length; i += 2) {
    const last = Math.ceil(region.ranges[i + 1]! / width);
    for (let cell = Math.floor(region.ranges[i]! / width); cell < last && seen.size < 4 * MOST_CELLS; cell++) {
      if (seen.has(cell)) continue;
      seen.add(cell);
      cells.push({
        corners: cellBoundary(order, cell, 1).map(({ lon, lat }) => ({ raDeg: lon / RAD, decDeg: lat / RAD })),
      });
    }
  }
  return cells;
}

/** Where a catalogue looked. */
export function CoverageMap({ moc }: { moc: string }) {
  const drawn = useMemo(() => {
    const cells = outlines(moc);
    const corners = cells.flatMap((cell) => cell.corners);
    const projection = chooseProjection(corners);
    const shapes = cells.map((cell) => cell.corners.map(({ raDeg, decDeg }) => projection.place(raDeg, decDeg)));
    const whole = projection.kind === 'whole sky';
    // On the whole-sky map a cell across the seam would be drawn through the middle.
    const kept = shapes.filter(
      (shape): shape is [number, number][] =>
        shape.every((point) => point !== undefined) && (!whole || spread(shape as [number, number][]) < 2),
    );
    const xs = whole ? [-2.83, 2.83] : kept.flat().map(([x]) => x);
    const ys = whole ? [-1.415, 1.415] : kept.flat().map(([, y]) => y);
    const low = (values: number[]) => values.reduce((a, b) => Math.min(a, b), Infinity);
    const high = (values: number[]) => values.reduce((a, b) => Math.max(a, b), -Infinity);
    const span = Math.max(high(xs) - low(xs), high(ys) - low(ys));
    const box = {
      x: low(xs) - span * 0.06,
      y: -high(ys) - span * 0.06,
      width: high(xs) - low(xs) + span * 0.12,
      height: high(ys) - low(ys) + span * 0.12,
    };
    return { kept, box, lines: graticule(projection, span / RAD) };
  }, [moc]);
  const { box, kept, lines } = drawn;
  const path = (points: readonly (readonly [number, number])[]) =>
    points.map(([x, y], i) => `${i ? 'L' : 'M'}${x.toFixed(5)} ${(-y).toFixed(5)}`).join('');
  return (
    <svg
      className="coverage-map"
      viewBox={`${box.x} ${box.y} ${box.width} ${box.height}`}
      role="img"
      aria-label={`Coverage: ${kept.length} cells, north up, east left`}
    >
      {lines.map(({ points, label }) => (
        <path key={label + String(points.length)} className="coverage-map__line" d={path(points)} />
      ))}
      <path className="coverage-map__cells" d={kept.map((shape) => `${path(shape)}Z`).join('')} />
    </svg>
  );
}

const spread = (shape: [number, number][]) => Math.max(...shape.map(([x]) => x)) - Math.min(...shape.map(([x]) => x));
