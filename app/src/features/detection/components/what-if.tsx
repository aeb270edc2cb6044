import type { WhatIf, WhatIfPoint } from '@eremite/shared/contracts/what-if';
import { useMemo } from 'react';
import { StarlightWord, SurroundingsWord } from '#components/verdict-mark/verdict-word.tsx';
import { fixed, probability } from '#lib/format/number.ts';
import { verdictSpans, type VerdictSpan } from '../hooks/verdict-spans.ts';
import './what-if.css';

interface WhatIfPanelProps {
  answer: WhatIf;
  /** Distance in use (angular-diameter), Mpc; null where there is none. */
  nominalMpc: number | null;
  /** Distance that is supposed (angular-diameter), Mpc. */
  atMpc: number;
  /** What was judged nearest to it. */
  point: WhatIfPoint;
  onSuppose: (mpc: number) => void;
}

/** Steps of the slider: 0.7 per cent each over a factor of nine. */
const STEPS = 300;

/** A slider over distances, with where each verdict holds, and what the server would say at the distance chosen. */
export function WhatIfPanel({ answer, nominalMpc, atMpc, point, onSuppose }: WhatIfPanelProps) {
  const { points } = answer;
  const [nearest, furthest] = [points[0]!.angularMpc, points.at(-1)!.angularMpc];
  const share = (mpc: number) => Math.log(mpc / nearest) / Math.log(furthest / nearest);
  const starlight = useMemo(() => verdictSpans(points, (one) => one.starlight), [points]);
  const surroundings = useMemo(() => verdictSpans(points, (one) => one.surroundings), [points]);
  const mpcOf = (step: number) => nearest * (furthest / nearest) ** (step / STEPS);
  return (
    <div className="what-if">
      <label className="what-if__slider">
        <span>
          If the distance were <b className="num">{fixed(atMpc, 1)} Mpc</b>
          {nominalMpc !== null && <span className="muted"> (in use: {fixed(nominalMpc, 1)})</span>}
        </span>
        <input
          type="range"
          min={0}
          max={STEPS}
          value={Math.round(share(atMpc) * STEPS)}
          onChange={(event) => onSuppose(mpcOf(Number(event.currentTarget.value)))}
          aria-valuetext={`${fixed(atMpc, 1)} megaparsecs: ${point.starlight}, ${point.surroundings}`}
        />
      </label>
      {nominalMpc !== null && (
        <div className="what-if__nominal" aria-hidden="true">
          <i style={{ left: `${share(nominalMpc) * 100}%` }} />
        </div>
      )}
      <Spans title="Starlight" spans={starlight} share={share} />
      <Spans title="Surroundings" spans={surroundings} share={share} />
      <div className="what-if__verdict" role="status">
        <StarlightWord verdict={point.starlight} />
        <SurroundingsWord verdict={point.surroundings} />
        <span className="num muted">
          P(none) {probability(point.pNone)} · power {probability(point.power)} · P(no neighbour){' '}
          {probability(point.pAlone)} · log M<sub>HI</sub> {fixed(point.logHiMass, 2)}
          {point.nearest && ` · ${point.nearest.name} at ${fixed(point.nearest.separationKpc, 0)} kpc`}
        </span>
      </div>
      <p className="muted small">
        As the server would judge it had that distance been measured
        {answer.distanceFraction !== null && ` to ${fixed(answer.distanceFraction * 100, 0)} %`}; nothing is kept.
        {answer.notes.length > 0 && ` ${answer.notes.join(' ')}`}
      </p>
    </div>
  );
}

interface SpansProps {
  title: string;
  spans: readonly VerdictSpan<string>[];
  share: (mpc: number) => number;
}

/** Where along the slider each verdict holds; the edges are the distances that flip it. */
function Spans({ title, spans, share }: SpansProps) {
  return (
    <ol className="what-if__spans" aria-label={`${title} by distance`}>
      {spans.map(({ verdict, fromMpc, toMpc }, i) => (
        <li
          key={fromMpc}
          style={{ width: `${(share(toMpc) - share(fromMpc)) * 100}%` }}
          title={`${verdict}: ${fixed(fromMpc, 1)} to ${fixed(toMpc, 1)} Mpc`}
        >
          {i > 0 && <span className="num what-if__edge">{fixed(fromMpc, fromMpc < 10 ? 2 : 1)}</span>}
          <span className="what-if__word">{verdict}</span>
          <span className="visually-hidden">
            {' '}
            from {fixed(fromMpc, 1)} to {fixed(toMpc, 1)} Mpc
          </span>
        </li>
      ))}
    </ol>
  );
}
