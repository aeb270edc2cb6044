import type { Ground, VerdictItem } from '@eremite/shared/contracts/verdict';
import { Link } from 'react-router-dom';
import { Prose } from '#components/prose/prose.tsx';
import { paths } from '#config/paths.ts';

/**
 * Why the verdicts are what they are, in sentences, each under the verdict it speaks for or against: what speaks against
 * it first, what is only worth knowing folded away.
 */
export function Grounds({ verdict }: { verdict: Pick<VerdictItem, 'grounds' | 'starlight' | 'surroundings'> }) {
  const { grounds } = verdict;
  const notes = grounds.filter(({ weight }) => weight === 'note');
  return (
    <section aria-label="Grounds">
      <Speaking of={verdict.starlight} grounds={grounds.filter(({ about }) => about !== 'surroundings')} />
      <Speaking of={verdict.surroundings} grounds={grounds.filter(({ about }) => about === 'surroundings')} />
      {notes.length > 0 && (
        <details className="grounds__notes">
          <summary>
            {notes.length} {notes.length === 1 ? 'note' : 'notes'} on distance, position and data
          </summary>
          <ul className="grounds">{notes.map(item)}</ul>
        </details>
      )}
    </section>
  );
}

function Speaking({ of, grounds }: { of: string; grounds: readonly Ground[] }) {
  const against = grounds.filter(({ weight }) => weight === 'against');
  const speaking = grounds.filter(({ weight }) => weight === 'for');
  if (against.length + speaking.length === 0) return null;
  return (
    <>
      <h3 className="grounds__of">
        For and against <q>{of}</q>
      </h3>
      <ol className="grounds">{[...against, ...speaking].map(item)}</ol>
    </>
  );
}

const item = ({ text, weight, about, method }: Ground) => (
  <li key={about + text} className={`grounds__item grounds__item--${weight}`}>
    <span className="grounds__weight">{weight}</span>
    <span>
      <Prose text={text} />
      {method && (
        <>
          {' '}
          <Link to={paths.methods(method)} className="grounds__method" aria-label={`how: method ${method}`}>
            how
          </Link>
        </>
      )}
    </span>
  </li>
);
