import type { Doubt } from '@eremite/shared/contracts/verdict';
import { DoubtMark } from '#components/doubt-mark/doubt-mark.tsx';
import { Prose } from '#components/prose/prose.tsx';

const ORDER = ['serious', 'watch', 'not testable here', 'clear'];

/** What could fake the result: what stands first, what was cleared folded away. */
export function DoubtList({ doubts }: { doubts: readonly Doubt[] }) {
  const sorted = [...doubts].sort((a, b) => ORDER.indexOf(a.grade) - ORDER.indexOf(b.grade));
  const cleared = sorted.filter(({ grade }) => grade === 'clear');
  const standing = sorted.filter(({ grade }) => grade !== 'clear');
  return (
    <section aria-labelledby="doubts">
      <h3 id="doubts">Doubts</h3>
      {sorted.length === 0 && <p className="muted">None was tested.</p>}
      <ul className="doubt-list">{standing.map(item)}</ul>
      {cleared.length > 0 && (
        <details className="doubt-list__cleared">
          <summary>
            <DoubtMark grade="clear" />
            <b>clear</b> {cleared.map(({ name }) => name).join(', ')}
          </summary>
          <ul className="doubt-list">{cleared.map(item)}</ul>
        </details>
      )}
    </section>
  );
}

const item = ({ name, grade, sentence, rule, source }: Doubt) => (
  <li key={name} title={`${rule} (${source})`}>
    <DoubtMark grade={grade} />
    <span>
      <b>{name}</b> <span className={`doubt-list__grade doubt-list__grade--${grade.split(' ')[0]}`}>{grade}</span>
      <span className="doubt-list__sentence">
        <Prose text={sentence} />
      </span>
    </span>
  </li>
);
