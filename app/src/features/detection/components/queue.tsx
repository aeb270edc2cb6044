import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import { useEffect, useRef } from 'react';
import { Link } from 'react-router-dom';
import { StarlightMark } from '#components/verdict-mark/starlight-mark.tsx';
import { SurroundingsMark } from '#components/verdict-mark/surroundings-mark.tsx';
import { count, probability } from '#lib/format/number.ts';

interface QueueProps {
  title: string;
  back: string;
  items: readonly Listed[];
  total: number;
  current: string;
  to: (detectionId: string) => string;
}

/** What the docket knows besides the verdict. */
type Listed = VerdictItem & { reviewedByMe?: boolean; moved?: readonly unknown[] };
const isDone = ({ reviewedByMe, settled }: Listed): boolean => reviewedByMe === true || settled?.stands === true;
const isBack = (item: Listed): boolean => !isDone(item) && (item.moved?.length ?? 0) > 0;

/** The list one is working through, with the present one marked and always in sight. */
export function Queue({ title, back, items, total, current, to }: QueueProps) {
  const here = useRef<HTMLLIElement>(null);
  useEffect(() => {
    // In braces: newer browsers answer with a promise, which must not be taken for the effect's clean-up.
    void here.current?.scrollIntoView({ block: 'nearest' });
  }, [current, items]);
  return (
    <nav className="queue" aria-label={title}>
      <div className="queue__head">
        <p>
          <Link to={back}>{title}</Link> <span className="muted num">{count(total)}</span>
        </p>
        <div className="queue__legend muted">
          <span>P(none)</span>
          <span>P(alone)</span>
        </div>
      </div>
      <ol>
        {items.map((item) => (
          <li key={item.detectionId} ref={item.detectionId === current ? here : undefined}>
            <Link
              to={to(item.detectionId)}
              className={isDone(item) ? 'is-done' : undefined}
              aria-current={item.detectionId === current ? 'page' : undefined}
            >
              <StarlightMark verdict={item.starlight} size={14} />
              <SurroundingsMark verdict={item.surroundings} size={14} />
              <span className="queue__name" title={`${item.name}: ${item.starlight}, ${item.surroundings}`}>
                {item.name}
                <span className="visually-hidden">
                  , {item.starlight}, {item.surroundings}
                  {isDone(item) ? ', decided by you' : ''}
                  {isBack(item) ? ', came back' : ''}
                </span>
                {isDone(item) && <span aria-hidden="true"> ✓</span>}
                {isBack(item) && <span aria-hidden="true"> ↺</span>}
              </span>
              <span>{probability(item.pNone)}</span>
              <span>{probability(item.pAlone)}</span>
            </Link>
          </li>
        ))}
      </ol>
    </nav>
  );
}
