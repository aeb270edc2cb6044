import type { Ground } from '@eremite/shared/contracts/verdict';
import { Prose } from '#components/prose/prose.tsx';

const SIGNS = { for: 'for', against: 'against', note: 'note' } as const;

/** Why the verdict is what it is, in sentences; what speaks against it first. */
export function Grounds({ grounds }: { grounds: readonly Ground[] }) {
  if (grounds.length === 0) return null;
  const order = { against: 0, for: 1, note: 2 };
  const sorted = [...grounds].sort((a, b) => order[a.weight] - order[b.weight]);
  return (
    <section aria-label="Grounds">
      <ol className="grounds">
        {sorted.map(({ text, weight, about }) => (
          <li key={about + text} className={`grounds__item grounds__item--${weight}`}>
            <span className="grounds__weight">{SIGNS[weight]}</span>
            <span>
              <Prose text={text} />
            </span>
          </li>
        ))}
      </ol>
    </section>
  );
}
