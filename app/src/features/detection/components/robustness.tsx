import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { count, fixed, probability } from '#lib/format/number.ts';
import { Prose } from '#components/prose/prose.tsx';

const percent = (value: number) => `${fixed(value * 100, 1)} %`;

/** How often the verdict stands when what is held fixed is drawn from its errors, and what would flip it. */
export function Robustness({ detail }: { detail: VerdictDetail }) {
  const { robustness } = detail.verdict;
  return (
    <section className="stack">
      {robustness ? (
        <>
          <dl className="facts">
            {robustness.starlightStability !== null && (
              <Stability
                term="Starlight verdict stands"
                value={robustness.starlightStability}
                interval={robustness.starlightInterval}
              />
            )}
            {robustness.surroundingsStability !== null && (
              <Stability
                term="Surroundings verdict stands"
                value={robustness.surroundingsStability}
                interval={robustness.surroundingsInterval}
              />
            )}
            <dt>Draws</dt>
            <dd className="num">
              {count(robustness.draws)} <span className="muted">seed {robustness.seed}</span>
            </dd>
          </dl>
          <ul>
            {robustness.flips.map((flip) => (
              <li key={flip}>
                <Prose text={flip} />
              </li>
            ))}
          </ul>
        </>
      ) : (
        <p className="muted">No draws were made in this run: the criteria switch them off.</p>
      )}
      {detail.priors.length > 0 && (
        <dl className="facts">
          {detail.priors.map(({ prior, pNone, pMissed }) => (
            <Prior key={prior} prior={prior} pNone={pNone} pMissed={pMissed} />
          ))}
        </dl>
      )}
    </section>
  );
}

const Stability = ({ term, value, interval }: { term: string; value: number; interval: [number, number] | null }) => (
  <>
    <dt>{term}</dt>
    <dd className="num">
      in {percent(value)} of the draws
      {interval && (
        <span className="muted">
          {' '}
          ({percent(interval[0])} to {percent(interval[1])}, 95 %)
        </span>
      )}
    </dd>
  </>
);

const Prior = ({ prior, pNone, pMissed }: { prior: number; pNone: number; pMissed: number }) => (
  <>
    <dt>At a prior of {fixed(prior, 3)}</dt>
    <dd className="num">
      P(none) {probability(pNone)}, P(missed) {probability(pMissed)}
    </dd>
  </>
);
