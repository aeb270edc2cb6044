import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { Link } from 'react-router-dom';
import { MovedList } from '#components/moved-list/moved-list.tsx';
import { useOthersEvent } from '#components/survey-events/latest-event.ts';
import type { Said } from './history.tsx';

interface NoticesProps {
  detail: VerdictDetail;
  said: Said;
  /** The newest finished run, where it is not the one on the page. */
  newerRun: { number: number; to: string } | undefined;
}

/** What one must know before deciding: the evidence moved, a newer run, someone else's word just now. */
export function Notices({ detail, said, newerRun }: NoticesProps) {
  const event = useOthersEvent(detail.verdict.detectionId);
  const mine = said.reviews.find((review) => review.mine && review.returned?.runNumber === detail.runNumber);
  // The word itself stands in the summary; here only that its evidence does not.
  const settled = said.settlement?.moved.length ? said.settlement : null;
  if (!event && !mine && !newerRun && !settled) return null;
  return (
    <div className="notices" role="status">
      {newerRun && (
        <p>
          Run {newerRun.number} has finished since this run. <Link to={newerRun.to}>Look at it there.</Link> A decision
          here is held to that run too.
        </p>
      )}
      {event && (
        <p>
          <b>{event.actor}</b> {event.action} just now.
        </p>
      )}
      {mine?.returned && (
        <MovedList
          lead={`Back on your docket: what moved since your word in run ${mine.runNumber}`}
          moved={mine.returned.moved}
        />
      )}
      {settled && (
        <MovedList
          lead={`Settled by ${settled.mine ? 'you' : settled.by} on other evidence; what moved since`}
          moved={settled.moved}
        />
      )}
    </div>
  );
}
