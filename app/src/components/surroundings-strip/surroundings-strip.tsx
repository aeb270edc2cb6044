import { SCREEN } from '@eremite/shared/drawing/drawing-theme';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';
import { stripBackdrop } from '@eremite/shared/drawing/strip-backdrop';
import { type PlacedMark, stripLayout } from '@eremite/shared/drawing/strip-layout';
import { stripSummary } from '@eremite/shared/drawing/strip-summary';
import type { StripZones } from '@eremite/shared/drawing/strip-zones';
import { useMemo, type KeyboardEvent, type ReactNode } from 'react';
import { fixed, signed } from '#lib/format/number.ts';
import './surroundings-strip.css';

interface SurroundingsStripProps {
  marks: readonly SkyMark[];
  zones: StripZones;
  hovered: string | null;
  selected: string | null;
  onHover: (key: string | null) => void;
  onSelect: (key: string | null) => void;
  /** Buttons of the strip. */
  tools?: ReactNode;
  /** What stands below it. */
  children?: ReactNode;
}

const WIDTH = 560;
const HEIGHT = 196;

/** How far and how fast everything is that has a velocity; those without one stand on a shelf below. */
export function SurroundingsStrip(props: SurroundingsStripProps) {
  const { marks, zones, hovered, selected, onHover, onSelect } = props;
  const layout = useMemo(() => stripLayout(marks, zones, { width: WIDTH, height: HEIGHT }), [marks, zones]);
  const backdrop = useMemo(() => ({ __html: stripBackdrop(layout, SCREEN) }), [layout]);
  const shelf = layout.placed.filter(({ where }) => where === 'shelf').length;
  const onKeyDown = (event: KeyboardEvent) => {
    if ((event.key !== ']' && event.key !== '[') || event.ctrlKey || event.metaKey) return;
    event.preventDefault();
    event.stopPropagation();
    const inOrder = layout.placed.filter(({ where }) => where !== 'shelf').sort((a, b) => a.kpc - b.kpc);
    const at = inOrder.findIndex(({ mark }) => mark.key === selected);
    const next = event.key === ']' ? inOrder[at + 1] : inOrder[at < 0 ? inOrder.length - 1 : at - 1];
    if (next) onSelect(next.mark.key);
  };
  return (
    <figure className="strip">
      {props.tools && <div className="strip__tools">{props.tools}</div>}
      <div
        tabIndex={0}
        role="group"
        onKeyDown={onKeyDown}
        aria-label={`Surroundings strip. ${stripSummary(layout)}. Square brackets step through the objects with a velocity; the tables list them.`}
      >
        <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} aria-hidden="true">
          <g dangerouslySetInnerHTML={backdrop} />
          {layout.placed.map((one) => (
            <StripMark
              key={one.mark.key}
              placed={one}
              state={selected === one.mark.key ? ' is-selected' : hovered === one.mark.key ? ' is-hovered' : ''}
              onHover={onHover}
              onSelect={onSelect}
            />
          ))}
          <text x={layout.right} y={layout.floor - 4} textAnchor="end">
            no velocity: {shelf}
          </text>
        </svg>
      </div>
      {props.children}
    </figure>
  );
}

interface StripMarkProps {
  placed: PlacedMark;
  state: string;
  onHover: (key: string | null) => void;
  onSelect: (key: string | null) => void;
}

function StripMark({ placed: { mark, kpc, x, y, where }, state, onHover, onSelect }: StripMarkProps) {
  const events = {
    onMouseEnter: () => onHover(mark.key),
    onMouseLeave: () => onHover(null),
    onClick: () => onSelect(mark.key),
  };
  const velocity =
    mark.velocityDifferenceKms === null ? 'no velocity' : `${signed(mark.velocityDifferenceKms, 0)} km/s`;
  const title = <title>{`${mark.name}: ${fixed(kpc, kpc < 100 ? 1 : 0)} kpc, ${velocity}`}</title>;
  if (where === 'shelf') {
    return (
      <path className={`strip__shelf${state}`} d={`M${x.toFixed(1)} ${y - 4}v8`} {...events}>
        {title}
      </path>
    );
  }
  const classes = `strip__mark strip__mark--${mark.agreement}${state}`;
  if (where === 'inside') {
    return (
      <circle className={classes} cx={x} cy={y} r={state ? 6 : 4} {...events}>
        {title}
      </circle>
    );
  }
  const tip = where === 'above' ? -5 : 5;
  return (
    <path className={classes} d={`M${(x - 3.5).toFixed(1)} ${y.toFixed(1)}l3.5 ${tip}l3.5 ${-tip}Z`} {...events}>
      {title}
    </path>
  );
}
