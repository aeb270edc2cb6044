import { Button } from '@blueprintjs/core';
import type { Override, Review } from '@eremite/shared/contracts/review';
import { moment } from '#lib/format/time.ts';

interface HistoryProps {
  reviews: readonly Review[];
  overrides: readonly Override[];
  onWithdraw?: ((override: Override) => void) | undefined;
}

/** Who decided what, when and why; the newest first. */
export function History({ reviews, overrides, onWithdraw }: HistoryProps) {
  const entries = [
    ...reviews.map((review) => ({ at: review.createdAt, key: review.id, body: <ReviewLine review={review} /> })),
    ...overrides.map((override) => ({
      at: override.createdAt,
      key: override.id,
      body: <OverrideLine override={override} onWithdraw={onWithdraw} />,
    })),
  ].sort((a, b) => b.at.localeCompare(a.at));
  if (entries.length === 0) return <p className="muted">No review and no override yet.</p>;
  return (
    <ul className="history">
      {entries.map(({ key, body }) => (
        <li key={key}>{body}</li>
      ))}
    </ul>
  );
}

const ReviewLine = ({ review }: { review: Review }) => (
  <>
    <p>
      <b>{review.mine ? 'You' : review.reviewer}</b> {review.agrees ? 'agreed' : 'overrode the verdict'}:{' '}
      {review.starlight}, {review.surroundings}
    </p>
    {review.note && <p>{review.note}</p>}
    <p className="muted small num">
      run {review.runNumber} · {moment(review.createdAt)}
    </p>
  </>
);

function OverrideLine({ override, onWithdraw }: { override: Override; onWithdraw: HistoryProps['onWithdraw'] }) {
  const withdrawn = override.withdrawnAt !== null;
  return (
    <>
      <p className={withdrawn ? 'history__gone' : undefined}>
        <b>{override.by}</b> {override.action === 'accept' ? 'made' : 'rejected'} {override.objectName}{' '}
        {override.action === 'accept' ? 'the counterpart' : 'as counterpart'}
      </p>
      <p>{override.note}</p>
      {withdrawn && (
        <p>
          Withdrawn by {override.withdrawnBy}: {override.withdrawnNote}
        </p>
      )}
      <p className="muted small num row">
        {moment(override.createdAt)}
        {!withdrawn && onWithdraw && (
          <Button size="small" variant="minimal" text="Withdraw" onClick={() => onWithdraw(override)} />
        )}
      </p>
    </>
  );
}
