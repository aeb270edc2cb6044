import type { PlotPoint } from '@eremite/shared/contracts/plot';
import { PAPER, SCREEN } from '@eremite/shared/drawing/drawing-theme';
import { useEffect, useRef, useState, type CSSProperties } from 'react';
import { SaveMenu } from '#components/save-menu/save-menu.tsx';
import { Panel } from '#components/panel/panel.tsx';
import { Prose } from '#components/prose/prose.tsx';
import { fileNameOf } from '#lib/save-picture.ts';
import type { Chart, ChartContext } from '../charts/chart.ts';
import { chartSummary } from '../charts/chart-summary.ts';
import type { Brush } from '../hooks/brush.ts';
import { useDrag } from '../hooks/use-drag.ts';
import { useWidth } from '../hooks/use-width.ts';
import { svgText } from '../charts/svg-text.ts';
import { RangeFields } from './range-fields.tsx';

interface SurveyPlotProps {
  chart: Chart;
  context: ChartContext;
  points: readonly PlotPoint[];
  lit: ReadonlySet<string> | null;
  brush: Brush | null;
  onBrush: (brush: Brush | null) => void;
  /** Begins the names of saved files. */
  fileName: string;
}

const HEIGHT = 380;
const SAVED = { width: 760, height: 560 };

/** One plot with its brush: drag over it, or give the limits as numbers. */
export function SurveyPlot(props: SurveyPlotProps) {
  const { chart, context, points, lit, brush, onBrush } = props;
  const host = useRef<HTMLDivElement>(null);
  const frame = useRef<HTMLDivElement>(null);
  const width = useWidth(frame);
  const drawn = useRef<ReturnType<Chart['draw']> | null>(null);
  const [place, setPlace] = useState<CSSProperties | null>(null);
  useEffect(() => {
    if (width === 0) return;
    const picture = chart.draw({ ...context, points, lit, theme: SCREEN, width, height: HEIGHT });
    // Its groups carry labels without a role; what it shows is said by the element around it.
    picture.setAttribute('aria-hidden', 'true');
    host.current?.replaceChildren(picture);
    drawn.current = picture;
    return () => picture.remove();
  }, [chart, context, points, lit, width]);
  useEffect(() => {
    const picture = drawn.current;
    if (!picture || brush?.chart !== chart.id) return setPlace(null);
    const [x, y] = [picture.scale('x'), picture.scale('y')];
    const [left, right] = brush.x.map((value) => x.apply(value)) as [number, number];
    const [bottom, top] = brush.y.map((value) => y.apply(value)) as [number, number];
    setPlace({ left, width: right - left, top, height: bottom - top });
  }, [brush, chart, width, points, lit]);
  const drag = useDrag((box) => {
    const picture = drawn.current;
    if (!box || !picture) return onBrush(null);
    const [x, y] = [picture.scale('x').invert!, picture.scale('y').invert!];
    const ordered = (a: number, b: number): [number, number] => (a < b ? [a, b] : [b, a]);
    onBrush({ chart: chart.id, x: ordered(x(box.x1), x(box.x2)), y: ordered(y(box.y1), y(box.y2)) });
  });
  const save = () => svgText(chart.draw({ ...context, points, lit: null, theme: PAPER, ...SAVED }), chart, points);
  return (
    <Panel
      title={chart.title}
      aside={
        <SaveMenu label={`Save ${chart.title}`} fileName={fileNameOf(`${props.fileName}-${chart.id}`)} draw={save} />
      }
    >
      <figure className="survey-plot">
        <div
          ref={frame}
          className="survey-plot__field"
          role="img"
          aria-label={chartSummary(chart, points, lit)}
          {...drag.handlers}
        >
          <div ref={host} style={{ height: HEIGHT }} />
          {(drag.box ?? place) && (
            <i className="survey-plot__brush" aria-hidden="true" style={drag.box ? boxStyle(drag.box) : place!} />
          )}
        </div>
        <RangeFields chart={chart} brush={brush?.chart === chart.id ? brush : null} onBrush={onBrush} />
        <figcaption className="muted small">
          <Prose text={chart.caption} />
        </figcaption>
      </figure>
    </Panel>
  );
}

const boxStyle = ({ x1, y1, x2, y2 }: { x1: number; y1: number; x2: number; y2: number }): CSSProperties => ({
  left: Math.min(x1, x2),
  top: Math.min(y1, y2),
  width: Math.abs(x2 - x1),
  height: Math.abs(y2 - y1),
});
