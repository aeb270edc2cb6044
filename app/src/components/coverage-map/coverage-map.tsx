import { useMemo } from 'react';
import './coverage-map.css';
import { footprintCells } from '#components/sky-chart/footprint-cells.ts';
import { graticule } from '#components/sky-chart/graticule.ts';
import { chooseProjection } from '#components/sky-chart/project-sky.ts';

const RAD = Math.PI / 180;
const sizeOf = (sideDeg: number) =>
  sideDeg >= 1
    ? `${sideDeg.toFixed(1)}°`
    : sideDeg >= 1 / 60
      ? `${(sideDeg * 60).toFixed(1)}′`
      : `${(sideDeg * 3600).toFixed(0)}″`;

/** Where a catalogue looked: its cells between meridians and parallels, north up, east left. */
export function CoverageMap({ moc }: { moc: string }) {
  const drawn = useMemo(() => {
    const { cells, sideDeg } = footprintCells(moc);
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
    return { kept, box, sideDeg, whole, lines: graticule(projection, span / RAD) };
  }, [moc]);
  const { box, kept, lines, sideDeg, whole } = drawn;
  // Text of about 11 pixels: the map is some 420 wide, and at most 300 high.
  const letter = 11 * Math.max(box.width / 420, box.height / 300);
  const path = (points: readonly (readonly [number, number])[]) =>
    points.map(([x, y], i) => `${i ? 'L' : 'M'}${x.toFixed(5)} ${(-y).toFixed(5)}`).join('');
  return (
    <figure className="coverage-figure">
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
        {lines.map(({ points, label }) => {
          // On the whole sky all meridians begin at the pole: their hours stand on the equator.
          const first =
            whole && label.includes('ʰ')
              ? points[points.length >> 1]
              : points.find(
                  ([x, y]) =>
                    x > box.x && x < box.x + box.width * 0.9 && -y > box.y + letter && -y < box.y + box.height,
                );
          return first ? (
            <text
              key={`${label} ${points.length}`}
              x={first[0] + letter / 4}
              y={-first[1] - letter / 4}
              fontSize={letter}
              aria-hidden="true"
            >
              {label}
            </text>
          ) : null;
        })}
      </svg>
      <figcaption className="muted small">
        Drawn in cells of <span className="num">{sizeOf(sideDeg)}</span>; north is up, east left.
      </figcaption>
    </figure>
  );
}

const spread = (shape: [number, number][]) => Math.max(...shape.map(([x]) => x)) - Math.min(...shape.map(([x]) => x));
