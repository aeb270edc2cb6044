import type { PlotPoint } from '@eremite/shared/contracts/plot';
import { SCREEN } from '@eremite/shared/drawing/drawing-theme';
import { colourOf, VERDICT_SYMBOLS, type VerdictSymbol } from '../charts/verdict-symbols.ts';
import { count } from '#lib/format/number.ts';

const PATHS: Record<VerdictSymbol['symbol'], string> = {
  circle: 'M3 8a5 5 0 1 0 10 0a5 5 0 1 0-10 0Z',
  diamond: 'M8 2.5L12.5 8L8 13.5L3.5 8Z',
  times: 'M4 4L12 12M12 4L4 12',
  plus: 'M8 2.5V13.5M2.5 8H13.5',
  square: 'M4 4H12V12H4Z',
};

/** What the symbols mean, with how many there are. */
export const VerdictLegend = ({ points }: { points: readonly PlotPoint[] }) => (
  <ul className="plot-legend" aria-label="Starlight verdicts">
    {[...VERDICT_SYMBOLS].reverse().map(([verdict, symbol]) => (
      <li key={verdict}>
        <svg width="16" height="16" viewBox="0 0 16 16" aria-hidden="true">
          <path
            d={PATHS[symbol.symbol]}
            fill={symbol.filled ? colourOf(symbol, SCREEN) : 'none'}
            stroke={colourOf(symbol, SCREEN)}
            strokeWidth="1.6"
            transform={symbol.filled ? 'translate(4 4) scale(0.5)' : undefined}
          />
        </svg>
        {verdict} <span className="num">{count(points.filter(({ starlight }) => starlight === verdict).length)}</span>
      </li>
    ))}
  </ul>
);
