import { Button } from '@blueprintjs/core';
import type { DoubtWord, Override, Review, Settlement } from '@eremite/shared/contracts/review';
import type { Remark } from '@eremite/shared/contracts/remark';
import type { ReactNode } from 'react';
import { MovedList } from '#components/moved-list/moved-list.tsx';
import { AttachmentLinks } from '#components/note-field/attachment-links.tsx';
import { moment } from '#lib/format/time.ts';

export interface Said {
  reviews: readonly Review[];
  overrides: readonly Override[];
  doubtWords: readonly DoubtWord[];
  remarks: readonly Remark[];
  settlement: Settlement | null;
}
interface HistoryProps {
  said: Said;
  /** Takes a word back by its path; absent for those who may not. */
  onTakeBack?: ((path: string, of: string) => void) | undefined;
}

/** Who decided what, when and why; the newest first. */
export function History({ said, onTakeBack }: HistoryProps) {
  const { reviews, overrides, doubtWords, remarks, settlement } = said;
  const entries = [
    ...reviews.map((review) => ({ at: review.createdAt, key: review.id, body: <ReviewLine review={review} /> })),
    ...overrides.map((entry) => ({
      at: entry.createdAt,
      key: entry.id,
      body: (
        <Withdrawable
          entry={entry}
          words={`${entry.action === 'accept' ? 'made' : 'rejected'} ${entry.objectName} ${entry.action === 'accept' ? 'the counterpart' : 'as counterpart'}${entry.carried ? ' (taken along from an earlier version of the table)' : ''}`}
          onTakeBack={onTakeBack && (() => onTakeBack(`/overrides/${entry.id}`, entry.objectName))}
        />
      ),
    })),
    ...doubtWords.map((entry) => ({
      at: entry.createdAt,
      key: entry.id,
      body: (
        <Withdrawable
          entry={entry}
          words={`${entry.word} the doubt “${entry.doubt}” (computed: ${entry.grade})`}
          onTakeBack={onTakeBack && (() => onTakeBack(`/doubt-words/${entry.id}`, entry.doubt))}
        />
      ),
    })),
    ...remarks.map((remark) => ({ at: remark.createdAt, key: remark.id, body: <RemarkLine remark={remark} /> })),
    ...(settlement
      ? [{ at: settlement.createdAt, key: settlement.id, body: <SettlementLine settlement={settlement} /> }]
      : []),
  ].sort((a, b) => b.at.localeCompare(a.at));
  if (entries.length === 0) return <p className="muted">Nothing was said of it yet.</p>;
  return (
    <ul className="history">
      {entries.map(({ key, body }) => (
        <li key={key}>{body}</li>
      ))}
    </ul>
  );
}

interface LineProps {
  who: string;
  words: ReactNode;
  note: string;
  files: Review['attachments'];
  children: ReactNode;
  isGone?: boolean;
}
const Line = ({ who, words, note, files, children, isGone }: LineProps) => (
  <>
    <p className={isGone ? 'history__gone' : undefined}>
      <b>{who}</b> {words}
    </p>
    {note && <p className="history__note">{note}</p>}
    <AttachmentLinks attachments={files} />
    {children}
  </>
);

function ReviewLine({ review }: { review: Review }) {
  const { outcome, starlight, surroundings, carriedTo, returned } = review;
  const answer = outcome === 'verdict' ? `${starlight}, ${surroundings}` : outcome;
  const verb = outcome === 'needs an HI spectrum' ? 'asked for' : review.agrees ? 'agreed:' : 'departed:';
  return (
    <Line
      who={review.mine ? 'You' : review.reviewer}
      words={outcome === 'needs an HI spectrum' ? `${verb} a confirming HI spectrum` : `${verb} ${answer}`}
      note={review.note}
      files={review.attachments}
    >
      {returned && <MovedList lead={`The evidence moved in run ${returned.runNumber}:`} moved={returned.moved} />}
      <p className="muted small num">
        run {review.runNumber} · {moment(review.createdAt)}
        {carriedTo !== null && ` · stands in run ${carriedTo}`}
      </p>
    </Line>
  );
}

const SettlementLine = ({ settlement }: { settlement: Settlement }) => (
  <Line
    who={settlement.mine ? 'You' : settlement.by}
    words={`settled it: ${settlement.outcome === 'verdict' ? `${settlement.starlight}, ${settlement.surroundings}` : settlement.outcome}`}
    note={settlement.note}
    files={settlement.attachments}
  >
    {settlement.moved.length > 0 && <MovedList lead="The evidence moved since:" moved={settlement.moved} />}
    <p className="muted small num">
      run {settlement.runNumber} · {moment(settlement.createdAt)}
    </p>
  </Line>
);

const RemarkLine = ({ remark }: { remark: Remark }) => (
  <Line
    who={remark.mine ? 'You' : remark.author}
    words={remark.mentions.length > 0 ? `asked ${remark.mentions.map(({ name }) => name).join(', ')}` : 'remarked'}
    note={remark.text}
    files={remark.attachments}
  >
    <p className="muted small num">{moment(remark.createdAt)}</p>
  </Line>
);

interface WithdrawableProps {
  entry: Pick<
    Override,
    'by' | 'mine' | 'note' | 'createdAt' | 'withdrawnAt' | 'withdrawnBy' | 'withdrawnNote' | 'attachments'
  >;
  words: string;
  onTakeBack: (() => void) | undefined;
}
function Withdrawable({ entry, words, onTakeBack }: WithdrawableProps) {
  const isGone = entry.withdrawnAt !== null;
  return (
    <Line who={entry.mine ? 'You' : entry.by} words={words} note={entry.note} files={entry.attachments} isGone={isGone}>
      {isGone && (
        <p>
          Taken back by {entry.withdrawnBy}: {entry.withdrawnNote}
        </p>
      )}
      <p className="muted small num row">
        {moment(entry.createdAt)}
        {!isGone && onTakeBack && <Button size="small" variant="minimal" text="Take back" onClick={onTakeBack} />}
      </p>
    </Line>
  );
}
