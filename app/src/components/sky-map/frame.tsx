import { ARCSEC_PER_RAD } from '@eremite/shared/drawing/panel-plane';
import { rulerTicks, type Tick } from '@eremite/shared/drawing/ruler';

export interface PanelView {
  centre: [x: number, y: number];
  /** Arcsec a pixel. */
  resolution: number;
  width: number;
  height: number;
}

/** Width, pixels, from which the buttons at the upper left end before the middle. */
const CLEAR_OF_BUTTONS = 530;

interface FrameProps {
  view: PanelView;
  /** Angular-diameter distance, Mpc; null draws no physical ruler. */
  distanceMpc: number | null;
}

/** The angular unit that keeps the numbers short at this zoom. */
function angularUnit(spanArcsec: number): { size: number; sign: string } {
  if (spanArcsec < 150) return { size: 1, sign: '″' };
  if (spanArcsec < 9000) return { size: 60, sign: '′' };
  return { size: 3600, sign: '°' };
}

const bottom = (tick: Tick, height: number) => (
  <g key={tick.at} transform={`translate(${tick.at} ${height})`}>
    <path d="M0 0v-8" />
    <text y={-12} textAnchor="middle">
      {tick.text}
    </text>
  </g>
);

const right = (tick: Tick, width: number, height: number) => (
  <g key={tick.at} transform={`translate(${width} ${height - tick.at})`}>
    <path d="M0 0h-8" />
    <text x={-12} y={4} textAnchor="end">
      {tick.text}
    </text>
  </g>
);

/** The panel's frame is its ruler: angle below, kpc at the right at the distance of the gas; north and east said. */
export function Frame({ view, distanceMpc }: FrameProps) {
  const { centre, resolution, width, height } = view;
  const unit = angularUnit(width * resolution);
  const across = rulerTicks(centre[0] / unit.size, (width * resolution) / unit.size, width, unit.sign);
  const kpcPerArcsec = distanceMpc === null ? null : (distanceMpc * 1000) / ARCSEC_PER_RAD;
  const megaparsecs = kpcPerArcsec !== null && height * resolution * kpcPerArcsec > 4000;
  const scale = (kpcPerArcsec ?? 0) / (megaparsecs ? 1000 : 1);
  const up =
    kpcPerArcsec === null
      ? []
      : rulerTicks(centre[1] * scale, height * resolution * scale, height, megaparsecs ? ' Mpc' : ' kpc');
  const clear = (at: number, length: number) => at > 34 && at < length - 34;
  return (
    <svg className="sky-frame" width={width} height={height} aria-hidden="true">
      {across.filter(({ at }) => clear(at, width)).map((tick) => bottom(tick, height))}
      {up.filter(({ at }) => clear(at, height)).map((tick) => right(tick, width, height))}
      <text className="sky-frame__point" x={width / 2} y={width < CLEAR_OF_BUTTONS ? 52 : 17} textAnchor="middle">
        N
      </text>
      <text className="sky-frame__point" x={10} y={height / 2 + 4}>
        E
      </text>
    </svg>
  );
}
