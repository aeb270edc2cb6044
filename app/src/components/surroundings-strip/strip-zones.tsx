import { STRIP_MARGIN, type StripScale } from './strip-scale.ts';

/** Edges of the zones; kpc and km/s. */
export interface Zones {
  counterpartKpc: number | null;
  debrisKpc: number;
  debrisKms: number;
  neighbourKpc: number;
  neighbourKms: number;
}

const DECADES = [1, 10, 100, 1000, 10_000];

/** Counterpart, debris and neighbour zones with the axes. */
export function StripZones({ scale, zones }: { scale: StripScale; zones: Zones }) {
  const { x, y, width, height } = scale;
  const left = STRIP_MARGIN.left;
  const floor = height - STRIP_MARGIN.bottom;
  const box = (toKpc: number, kms: number) => ({
    x: left,
    y: y(kms),
    width: x(toKpc) - left,
    height: y(-kms) - y(kms),
  });
  const ticks = DECADES.filter((kpc) => x(kpc) < width - STRIP_MARGIN.right - 1 || kpc === 1);
  return (
    <g>
      <rect className="strip__zone strip__zone--neighbour" {...box(zones.neighbourKpc, zones.neighbourKms)} />
      <rect className="strip__zone strip__zone--debris" {...box(zones.debrisKpc, zones.debrisKms)} />
      {zones.counterpartKpc !== null && (
        <rect
          className="strip__zone strip__zone--counterpart"
          x={left}
          y={STRIP_MARGIN.top}
          width={Math.max(0, x(zones.counterpartKpc) - left)}
          height={floor - STRIP_MARGIN.top}
        />
      )}
      {ticks.map((kpc) => (
        <g key={kpc}>
          <path className="strip__grid" d={`M${x(kpc)} ${STRIP_MARGIN.top}V${floor}`} />
          <text x={x(kpc)} y={height - 8} textAnchor="middle">
            {kpc}
          </text>
        </g>
      ))}
      <path className="strip__axis" d={`M${left} ${y(0)}H${width - STRIP_MARGIN.right}`} />
      {[zones.neighbourKms, 0, -zones.neighbourKms].map((kms) => (
        <text key={kms} x={left - 8} y={y(kms) + 4} textAnchor="end">
          {kms > 0 ? `+${kms}` : kms < 0 ? `−${-kms}` : '0'}
        </text>
      ))}
      <text x={left - 8} y={STRIP_MARGIN.top + 6} textAnchor="end">
        km/s
      </text>
      <text x={left - 8} y={height - 8} textAnchor="end">
        kpc
      </text>
      {zones.counterpartKpc !== null && (
        <text className="strip__word strip__word--counterpart" x={left + 6} y={STRIP_MARGIN.top + 13}>
          counterpart
        </text>
      )}
      <text className="strip__word" x={x(zones.debrisKpc) - 6} y={y(-zones.debrisKms) - 6} textAnchor="end">
        debris
      </text>
      <text className="strip__word" x={x(zones.neighbourKpc) - 6} y={y(zones.neighbourKms) + 13} textAnchor="end">
        neighbours
      </text>
    </g>
  );
}
