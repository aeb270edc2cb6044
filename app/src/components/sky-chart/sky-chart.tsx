import { HTMLSelect } from '@blueprintjs/core';
import type { SurveyOverview } from '@eremite/shared/contracts/survey';
import { useEffect, useMemo, useRef, useState, type MouseEvent } from 'react';
import { readPalette } from '#components/sky-map/palette.ts';
import { usePreferences } from '#lib/preferences.ts';
import { drawMarks } from './draw-marks.ts';
import { footprintPath } from './footprint-path.ts';
import { graticule } from './graticule.ts';
import { chooseProjection } from './project-sky.ts';
import './sky-chart.css';

type Mark = SurveyOverview['marks'][number];

interface SkyChartProps {
  marks: readonly Mark[];
  /** Where each table looked, as MOC in ASCII. */
  footprints?: readonly { name: string; moc: string }[];
  onOpen: (detectionId: string) => void;
}

const NONE: readonly { name: string; moc: string }[] = [];
const WIDTH = 900;
const MARGIN = 34;

// Spreading a hundred thousand values into Math.min would overflow the stack.
const least = (values: readonly number[]) => values.reduce((a, b) => Math.min(a, b), Infinity);
const most = (values: readonly number[]) => values.reduce((a, b) => Math.max(a, b), -Infinity);

/** Scale and shift that bring all marks (or the whole sky) into the frame. */
function layOut(marks: readonly Mark[]) {
  const projection = chooseProjection(marks);
  const places = marks.map(({ raDeg, decDeg }): [number, number] => projection.place(raDeg, decDeg) ?? [0, 0]);
  const whole = projection.kind === 'whole sky';
  const xs = whole ? [-2.83, 2.83] : places.map(([x]) => x);
  const ys = whole ? [-1.415, 1.415] : places.map(([, y]) => y);
  const [left, right, low, high] = [least(xs), most(xs), least(ys), most(ys)];
  const span = Math.max(right - left, high - low, 0.004);
  const ratio = Math.min(0.62, Math.max(0.32, (high - low) / Math.max(right - left, 1e-9)));
  const height = Math.round((WIDTH - 2 * MARGIN) * ratio + 2 * MARGIN);
  const scale = Math.min(
    (WIDTH - 2 * MARGIN) / Math.max(right - left, span * 0.02),
    (height - 2 * MARGIN) / Math.max(high - low, span * 0.02),
  );
  const toPage = ([x, y]: readonly [number, number]): [number, number] => [
    WIDTH / 2 + (x - (left + right) / 2) * scale,
    height / 2 - (y - (low + high) / 2) * scale,
  ];
  const spanDeg = (span * 180) / Math.PI;
  return { projection, height, toPage, points: places.map(toPage), lines: graticule(projection, spanDeg) };
}

/** All detections of a survey on the sky, by verdict. The counts and the table beside it say the same in words. */
export function SkyChart({ marks, footprints = NONE, onOpen }: SkyChartProps) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const { theme } = usePreferences();
  const [near, setNear] = useState<number | null>(null);
  const { height, toPage, points, lines, projection } = useMemo(() => layOut(marks), [marks]);
  useEffect(() => {
    const context = canvas.current?.getContext('2d');
    if (!context) return;
    const density = window.devicePixelRatio || 1;
    canvas.current!.width = WIDTH * density;
    canvas.current!.height = height * density;
    context.scale(density, density);
    const placed = points.map(([x, y], i) => ({ x, y, starlight: marks[i]!.starlight }));
    drawMarks(context, placed, readPalette(document.documentElement));
  }, [marks, points, height, theme]);

  const nearest = (event: MouseEvent): number | null => {
    const box = event.currentTarget.getBoundingClientRect();
    const x = ((event.clientX - box.left) / box.width) * WIDTH;
    const y = ((event.clientY - box.top) / box.height) * height;
    let [best, distance] = [-1, 12];
    points.forEach(([px, py], i) => {
      const away = Math.hypot(px - x, py - y);
      if (away < distance) [best, distance] = [i, away];
    });
    return best < 0 ? null : best;
  };
  const path = (line: [number, number][]) =>
    line
      .map(
        (point, i) =>
          `${i ? 'L' : 'M'}${toPage(point)
            .map((v) => v.toFixed(1))
            .join(' ')}`,
      )
      .join('');
  const [shown, setShown] = useState('');
  const cells = useMemo(() => {
    const footprint = footprints.find(({ name }) => name === shown);
    return footprint ? footprintPath(footprint.moc, projection, toPage) : '';
  }, [footprints, shown, projection, toPage]);
  const at = near === null ? undefined : points[near];
  return (
    <figure className="sky-chart">
      <div
        className="sky-chart__field"
        style={{ aspectRatio: `${WIDTH} / ${height}`, cursor: near === null ? 'default' : 'pointer' }}
        onMouseMove={(event) => setNear(nearest(event))}
        onMouseLeave={() => setNear(null)}
        onClick={() => near !== null && onOpen(marks[near]!.detectionId)}
      >
        <svg viewBox={`0 0 ${WIDTH} ${height}`} aria-hidden="true">
          {cells && <path className="sky-chart__footprint" d={cells} />}
          {lines.map(({ points: line, label }) => (
            <path key={label + String(line.length)} d={path(line)} />
          ))}
          {lines.map(({ points: line, label }) => {
            const inside = line.map(toPage).find(([x, y]) => x > 8 && x < WIDTH - 46 && y > 16 && y < height - 8);
            return (
              inside && (
                <text key={label + String(line.length)} x={inside[0] + 4} y={inside[1] - 4}>
                  {label}
                </text>
              )
            );
          })}
        </svg>
        <canvas
          ref={canvas}
          role="img"
          aria-label={`${projection.kind === 'field' ? 'Field' : 'Whole sky'}: ${marks.length} detections by verdict${shown ? `, with the footprint of ${shown}` : ''}. The counts beside it lead to the same detections.`}
        />
        {at && near !== null && (
          <p
            className="sky-chart__label"
            style={{ left: `${(at[0] / WIDTH) * 100}%`, top: `${(at[1] / height) * 100}%` }}
          >
            {marks[near]!.name}
            <span>
              {marks[near]!.starlight ?? 'no verdict'}, {marks[near]!.surroundings ?? 'no verdict'}
            </span>
          </p>
        )}
      </div>
      <figcaption className="muted small sky-chart__caption">
        <span className="grow">North up, east left, ICRS.</span>
        {footprints.length > 0 && (
          <HTMLSelect
            aria-label="Footprint shown"
            value={shown}
            onChange={(event) => setShown(event.currentTarget.value)}
            options={[
              { value: '', label: 'no footprint' },
              ...footprints.map(({ name }) => ({ value: name, label: `footprint of ${name}` })),
            ]}
          />
        )}
      </figcaption>
    </figure>
  );
}
