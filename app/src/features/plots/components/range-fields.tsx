import { Button } from '@blueprintjs/core';
import type { Chart, ChartAxis } from '../charts/chart.ts';
import type { Brush } from '../hooks/brush.ts';

interface RangeFieldsProps {
  chart: Chart;
  brush: Brush | null;
  onBrush: (brush: Brush | null) => void;
}

type Limits = [number, number];
const ANY: Limits = [-99, 99];

/** The brush as numbers: for the keyboard, and for limits that are to be exact. */
export function RangeFields({ chart, brush, onBrush }: RangeFieldsProps) {
  const set = (axis: 'x' | 'y', limits: Limits) => {
    const next = { chart: chart.id, x: brush?.x ?? ANY, y: brush?.y ?? ANY, [axis]: limits };
    const isAny = ([low, high]: Limits) => low <= ANY[0] && high >= ANY[1];
    onBrush(isAny(next.x) && isAny(next.y) ? null : next);
  };
  return (
    <div className="range-fields">
      <Range axis={chart.x} limits={brush?.x ?? ANY} onChange={(limits) => set('x', limits)} />
      <Range axis={chart.y} limits={brush?.y ?? ANY} onChange={(limits) => set('y', limits)} />
      <Button size="small" variant="minimal" text="clear" disabled={!brush} onClick={() => onBrush(null)} />
    </div>
  );
}

interface RangeProps {
  axis: ChartAxis;
  limits: Limits;
  onChange: (limits: Limits) => void;
}

function Range({ axis, limits, onChange }: RangeProps) {
  const field = (end: 0 | 1, word: string) => {
    const shown = Math.abs(limits[end]) >= ANY[1] ? '' : axis.toText(limits[end]);
    return (
      <input
        // The brush may change under the field, which keeps what is typed until it is left.
        key={shown}
        className="bp6-input bp6-small"
        inputMode="decimal"
        aria-label={`${axis.label}, ${word}`}
        placeholder={word}
        defaultValue={shown}
        onKeyDown={(event) => event.key === 'Enter' && event.currentTarget.blur()}
        onBlur={(event) => {
          const text = event.currentTarget.value.trim().replace('−', '-');
          if (text === shown) return;
          const value = text === '' ? ANY[end] : axis.fromText(text);
          if (Number.isNaN(value)) event.currentTarget.value = shown;
          else onChange(end === 0 ? [value, limits[1]] : [limits[0], value]);
        }}
      />
    );
  };
  return (
    <span className="range-fields__axis">
      <span className="muted">{axis.label}</span>
      {field(0, 'from')}
      {field(1, 'to')}
    </span>
  );
}
