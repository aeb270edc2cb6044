import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { ProbabilityBar } from '#components/probability-bar/probability-bar.tsx';
import { Prose } from '#components/prose/prose.tsx';
import { StarlightMark } from '#components/verdict-mark/starlight-mark.tsx';
import { SurroundingsMark } from '#components/verdict-mark/surroundings-mark.tsx';
import { fixed, probability } from '#lib/format/number.ts';
import '#components/verdict-mark/verdict-mark.css';

/** Both verdicts with what they rest on: the bar that adds to one, and P(no neighbour) in its three factors. */
export function VerdictSummary({ detail }: { detail: VerdictDetail }) {
  const { verdict: v, aloneFactors } = detail;
  return (
    <section className="verdict-summary" aria-label="Verdict">
      {v.settled && (
        <p className="verdict-summary__settled">
          Settled by {v.settled.by} as <b>{v.settled.starlight}</b> and <b>{v.settled.surroundings}</b>:{' '}
          {v.settled.note}
        </p>
      )}
      <div>
        <h2>
          <StarlightMark verdict={v.starlight} size={20} /> {v.starlight}
          <span className="num verdict-summary__aside">
            power <b>{probability(v.power)}</b>
          </span>
        </h2>
        {v.headline && v.headline !== v.starlight && (
          <p className="verdict-summary__headline">
            <Prose text={v.headline} />
          </p>
        )}
        <Stands share={v.robustness?.starlightStability} />
        <ProbabilityBar pNone={v.pNone} pMissed={v.pMissed} pSpurious={v.pSpurious} />
      </div>
      <div>
        <h2>
          <SurroundingsMark verdict={v.surroundings} size={20} /> {v.surroundings}
          <span className="num verdict-summary__aside">
            P(no neighbour) <b>{probability(v.pAlone)}</b>
          </span>
        </h2>
        <Stands share={v.robustness?.surroundingsStability} />
        {aloneFactors ? (
          <dl className="factors" aria-label="Factors of the probability of no neighbour">
            <Factor term="no known one" value={aloneFactors.noneKnown} />
            <span aria-hidden="true">×</span>
            <Factor term="none unseen" value={aloneFactors.noneUnseen} />
            <span aria-hidden="true">×</span>
            <Factor term="covered" value={aloneFactors.covered} />
          </dl>
        ) : (
          <p className="muted">
            Not testable here:{' '}
            {detail.distance.kind === 'none'
              ? detail.distance.note
              : 'what the tables with redshifts cover, or how deep they reach, is not known at this place.'}
          </p>
        )}
      </div>
    </section>
  );
}

/** How often the verdict survives draws of what it holds fixed; the tab of that name says more. */
const Stands = ({ share }: { share: number | null | undefined }) =>
  share === null || share === undefined ? null : (
    <p className="muted small">
      stands in <span className="num">{fixed(share * 100, share > 0.995 && share < 1 ? 1 : 0)} %</span> of the draws
    </p>
  );

const Factor = ({ term, value }: { term: string; value: number }) => (
  <div>
    <dt>{term}</dt>
    <dd className="num">{probability(value)}</dd>
  </div>
);
