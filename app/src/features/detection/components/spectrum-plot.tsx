import type { SpectrumChannels, SpectrumFacts } from '@eremite/shared/contracts/observation';
import { useMemo } from 'react';
import { fixed, significant } from '#lib/format/number.ts';
import { spectrumLayout } from '../hooks/spectrum-layout.ts';

export interface MarkedVelocity {
  name: string;
  kms: number;
}
export interface MarkedBand {
  name: string;
  lowKms: number;
  highKms: number;
}

interface SpectrumPlotProps {
  channels: SpectrumChannels;
  facts: SpectrumFacts;
  /** As the catalogue has it. */
  table: { velocityKms: number | null; width50Kms: number | null };
  neighbours: readonly MarkedVelocity[];
  interference: readonly MarkedBand[];
}

const FRAME = { width: 620, height: 260, left: 54, right: 12, top: 26, bottom: 40 };
const FLOOR = FRAME.height - FRAME.bottom;

/** The line with what was measured of it, what the table says, and whose velocities are near. */
export function SpectrumPlot({ channels, facts, table, neighbours, interference }: SpectrumPlotProps) {
  const layout = useMemo(() => spectrumLayout(channels, FRAME), [channels]);
  const { x, y, lowKms, highKms } = layout;
  const { measurement } = facts;
  const isInside = (v: number) => v >= lowKms && v <= highKms;
  const clamp = (v: number) => x(Math.min(highKms, Math.max(lowKms, v)));
  const shown = neighbours.filter(({ kms }) => isInside(kms));
  const bands = interference.filter((band) => band.highKms > lowKms && band.lowKms < highKms);
  const { velocityKms, width50Kms } = table;
  const summary = measurement
    ? `Line at ${fixed(measurement.centreKms.value, 0)} km/s, W50 ${fixed(measurement.w50Kms.value, 0)} km/s; ${shown.length} velocities of neighbours within the spectrum.`
    : 'No line was measured.';
  return (
    <svg className="spectrum-plot" viewBox={`0 0 ${FRAME.width} ${FRAME.height}`} role="img" aria-label={summary}>
      {bands.map((band) => (
        <rect
          key={`${band.name}${band.lowKms}`}
          className="spectrum-plot__band"
          x={clamp(band.lowKms)}
          y={FRAME.top}
          width={Math.max(1.5, clamp(band.highKms) - clamp(band.lowKms))}
          height={FLOOR - FRAME.top}
        >
          <title>interference: {band.name || 'listed band'}</title>
        </rect>
      ))}
      {measurement && (
        <rect
          className="spectrum-plot__window"
          x={clamp(measurement.lowKms)}
          y={FRAME.top}
          width={clamp(measurement.highKms) - clamp(measurement.lowKms)}
          height={FLOOR - FRAME.top}
        />
      )}
      {layout.yTicks.map((tick) => (
        <g key={tick} className="spectrum-plot__tick">
          <path d={`M${FRAME.left} ${y(tick)}h-5`} />
          <text x={FRAME.left - 8} y={y(tick) + 4} textAnchor="end">
            {significant(tick, 3)}
          </text>
        </g>
      ))}
      {layout.xTicks.map((tick) => (
        <g key={tick} className="spectrum-plot__tick">
          <path d={`M${x(tick)} ${FLOOR}v5`} />
          <text x={x(tick)} y={FLOOR + 18} textAnchor="middle">
            {fixed(tick, 0)}
          </text>
        </g>
      ))}
      <path className="spectrum-plot__zero" d={`M${FRAME.left} ${y(0)}H${FRAME.width - FRAME.right}`} />
      <path className="spectrum-plot__frame" d={`M${FRAME.left} ${FRAME.top}V${FLOOR}H${FRAME.width - FRAME.right}`} />
      <path className="spectrum-plot__channels" d={layout.steps} />
      {layout.fit && <path className="spectrum-plot__fit" d={layout.fit} />}
      {shown.map(({ name, kms }) => (
        <path key={`${name}${kms}`} className="spectrum-plot__neighbour" d={`M${x(kms)} ${FRAME.top}v9`}>
          <title>
            {name}: {fixed(kms, 0)} km/s
          </title>
        </path>
      ))}
      {velocityKms !== null && isInside(velocityKms) && (
        <g className="spectrum-plot__table">
          <path d={`M${x(velocityKms)} ${FRAME.top - 14}v10`} />
          {width50Kms !== null && (
            <path
              d={`M${clamp(velocityKms - width50Kms / 2)} ${FRAME.top - 12}v6m0 -3H${clamp(velocityKms + width50Kms / 2)}m0 -3v6`}
            />
          )}
          <title>velocity and W50 of the table</title>
        </g>
      )}
      <text className="spectrum-plot__axis" x={(FRAME.left + FRAME.width) / 2} y={FRAME.height - 4} textAnchor="middle">
        cz, optical, barycentric, km/s
      </text>
      <text className="spectrum-plot__axis" x={4} y={14}>
        {facts.unit}
      </text>
    </svg>
  );
}
