import { useMemo } from 'react';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';
import { fixed, signed } from '#lib/format/number.ts';
import { STRIP_MARGIN, stripScale } from './strip-scale.ts';
import { StripZones, type Zones } from './strip-zones.tsx';
import './surroundings-strip.css';

interface SurroundingsStripProps {
  marks: readonly SkyMark[];
  zones: Zones;
  hovered: string | null;
  selected: string | null;
  onHover: (key: string | null) => void;
  onSelect: (key: string | null) => void;
}

const WIDTH = 560;
const HEIGHT = 168;

/** How far and how fast everything is that has a velocity; those without one stand on a shelf below. */
export function SurroundingsStrip(props: SurroundingsStripProps) {
  const { marks, zones, hovered, selected, onHover, onSelect } = props;
  const { placed, shelf, scale, outside } = useMemo(() => {
    const withPlace = marks.filter((mark) => mark.separationKpc !== null);
    const reach = Math.max(zones.neighbourKms, zones.debrisKms) * 1.35;
    const made = stripScale(WIDTH, HEIGHT, 1, Math.max(1500, zones.neighbourKpc * 1.5), reach);
    const fast = withPlace.filter((mark) => mark.velocityDifferenceKms !== null);
    return {
      scale: made,
      placed: fast.filter((mark) => Math.abs(mark.velocityDifferenceKms!) <= reach),
      outside: fast.filter((mark) => Math.abs(mark.velocityDifferenceKms!) > reach),
      shelf: withPlace.filter((mark) => mark.velocityDifferenceKms === null),
    };
  }, [marks, zones]);
  const shelfY = HEIGHT - STRIP_MARGIN.bottom + 10;
  const events = (key: string) => ({
    onMouseEnter: () => onHover(key),
    onMouseLeave: () => onHover(null),
    onClick: () => onSelect(key),
  });
  const lit = (key: string) => (selected === key ? ' is-selected' : hovered === key ? ' is-hovered' : '');
  return (
    <figure className="strip">
      <svg
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        role="img"
        aria-label={`Surroundings: ${placed.length} objects with a velocity within the strip, ${outside.length} beyond it, ${shelf.length} without one. The neighbour table lists them.`}
      >
        <StripZones scale={scale} zones={zones} />
        {shelf.map((mark) => (
          <path
            key={mark.key}
            className={`strip__shelf${lit(mark.key)}`}
            d={`M${scale.x(mark.separationKpc!).toFixed(1)} ${shelfY - 4}v8`}
            {...events(mark.key)}
          />
        ))}
        {placed.map((mark) => (
          <circle
            key={mark.key}
            className={`strip__mark strip__mark--${mark.agreement}${lit(mark.key)}`}
            cx={scale.x(mark.separationKpc!)}
            cy={scale.y(mark.velocityDifferenceKms!)}
            r={hovered === mark.key || selected === mark.key ? 6 : 4}
            {...events(mark.key)}
          >
            <title>{`${mark.name}: ${fixed(mark.separationKpc, 1)} kpc, ${signed(mark.velocityDifferenceKms, 0)} km/s`}</title>
          </circle>
        ))}
        <text className="strip__note" x={WIDTH - STRIP_MARGIN.right} y={shelfY - 8} textAnchor="end">
          {`no velocity: ${shelf.length}${outside.length ? ` · beyond in velocity: ${outside.length}` : ''}`}
        </text>
      </svg>
    </figure>
  );
}
