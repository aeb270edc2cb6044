import * as Plot from '@observablehq/plot';
import type { BandCounts } from '@eremite/shared/contracts/band-counts';
import { useEffect, useRef } from 'react';
import { count, fixed } from '#lib/format/number.ts';

/** Counts of one band against magnitude, logarithmic, with the depth that was stated and the one the counts suggest. */
export function MagnitudeHistogram({ band }: { band: BandCounts }) {
  const host = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const bins = band.counts.map((rows, i) => ({
      from: band.start + i * band.step,
      to: band.start + (i + 1) * band.step,
      rows,
    }));
    const chart = Plot.plot({
      width: 420,
      height: 192,
      marginLeft: 46,
      marginTop: 32,
      style: {
        background: 'transparent',
        fontFamily: 'var(--mono)',
        fontSize: '11px',
        color: 'var(--muted)',
        overflow: 'visible',
      },
      x: { label: `${band.band} (${band.system}), mag` },
      y: { type: 'log', label: 'rows', grid: true, ticks: 4, tickFormat: '~s' },
      marks: [
        Plot.rectY(
          bins.filter(({ rows }) => rows > 0),
          { x1: 'from', x2: 'to', y1: 0.8, y2: 'rows', fill: 'var(--lit)', insetLeft: 0.5, insetRight: 0.5 },
        ),
        ...(band.suggestedDepth === null
          ? []
          : [
              Plot.ruleX([band.suggestedDepth.magnitude], { stroke: 'var(--text)', strokeDasharray: '1 3' }),
              Plot.text([band.suggestedDepth.magnitude], {
                x: (depth: number) => depth,
                frameAnchor: 'top',
                lineAnchor: 'bottom',
                dy: band.depth5Sigma === null ? -3 : -15,
                text: () => 'turn-over',
                fill: 'var(--text)',
              }),
            ]),
        ...(band.depth5Sigma === null
          ? []
          : [
              Plot.ruleX([band.depth5Sigma], { stroke: 'var(--amber)', strokeWidth: 1.6, strokeDasharray: '5 3' }),
              Plot.text([band.depth5Sigma], {
                x: (depth: number) => depth,
                frameAnchor: 'top',
                lineAnchor: 'bottom',
                dy: -3,
                text: () => 'depth',
                fill: 'var(--amber)',
              }),
            ]),
      ],
    });
    // Its groups carry labels without a role; what it shows is said by the element around it.
    chart.setAttribute('aria-hidden', 'true');
    host.current?.replaceChildren(chart);
    return () => chart.remove();
  }, [band]);
  const stated = band.depth5Sigma === null ? 'no depth stated' : `5-sigma depth ${fixed(band.depth5Sigma, 1)}`;
  const turnover = band.suggestedDepth;
  const found = turnover
    ? `the counts turn over at ${fixed(turnover.magnitude, 1)} ± ${fixed(turnover.uncertainty, 1)}`
    : 'the counts show no turn-over';
  const depth = `${stated}; ${found}`;
  return (
    <figure>
      <div
        ref={host}
        role="img"
        aria-label={`${band.band}: ${count(band.count)} magnitudes from ${fixed(band.brightest, 1)} to ${fixed(band.faintest, 1)}, ${depth}`}
      />
      <figcaption className="muted small">
        <span className="num">{count(band.count)}</span> magnitudes, {fixed(band.brightest, 1)} to{' '}
        {fixed(band.faintest, 1)}
        {band.limits > 0 && `, ${count(band.limits)} upper limits`}; {depth}.
      </figcaption>
    </figure>
  );
}
