import type { Ground } from '@eremite/shared/contracts/verdict';
import { Link } from 'react-router-dom';
import { Prose } from '#components/prose/prose.tsx';
import { paths } from '#config/paths.ts';

/** Why the verdict is what it is, in sentences: what speaks against it first, what is only worth knowing folded away. */
export function Grounds({ grounds }: { grounds: readonly Ground[] }) {
  const against = grounds.filter(({ weight }) => weight === 'against');
  const speaking = grounds.filter(({ weight }) => weight === 'for');
  const notes = grounds.filter(({ weight }) => weight === 'note');
  return (
    <section aria-label="Grounds">
      <ol className="grounds">{[...against, ...speaking].map(item)}</ol>
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
