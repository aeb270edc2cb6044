import { Button } from '@blueprintjs/core';
import type { DoubtWord } from '@eremite/shared/contracts/review';
import type { Doubt } from '@eremite/shared/contracts/verdict';
import { DoubtMark } from '#components/doubt-mark/doubt-mark.tsx';
import { Prose } from '#components/prose/prose.tsx';

const ORDER = ['serious', 'watch', 'not testable here', 'clear'];

interface DoubtListProps {
  doubts: readonly Doubt[];
  /** What people said of them. */
  words: readonly DoubtWord[];
  /** Opens the question of one; absent for those who may not. */
  onDecide?: ((doubt: Doubt) => void) | undefined;
}

/** What could fake the result: what stands first, what was cleared folded away. */
export function DoubtList({ doubts, words, onDecide }: DoubtListProps) {
  const item = (doubt: Doubt) => (
    <DoubtItem
      key={doubt.name}
      doubt={doubt}
      word={words.find((entry) => entry.doubt === doubt.name && entry.withdrawnAt === null)}
      onDecide={onDecide}
    />
  );
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

interface DoubtItemProps {
  doubt: Doubt;
  word: DoubtWord | undefined;
  onDecide: DoubtListProps['onDecide'];
}
const DoubtItem = ({ doubt, word, onDecide }: DoubtItemProps) => (
  <li title={`${doubt.rule} (${doubt.source})`}>
    <DoubtMark grade={doubt.grade} />
    <span>
      <b>{doubt.name}</b>{' '}
      <span className={`doubt-list__grade doubt-list__grade--${doubt.grade.split(' ')[0]}`}>{doubt.grade}</span>
      {word && (
        <span className="doubt-list__word" title={word.note}>
          {' '}
          {word.word} by {word.mine ? 'you' : word.by}
        </span>
      )}
      {onDecide && doubt.grade !== 'clear' && (
        <Button
          size="small"
          variant="minimal"
          text="decide"
          aria-label={`decide on ${doubt.name}`}
          title="Clear it or confirm it"
          onClick={() => onDecide(doubt)}
        />
      )}
      <span className="doubt-list__sentence">
        <Prose text={doubt.sentence} />
      </span>
    </span>
  </li>
);
