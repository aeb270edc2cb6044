import type { Moved } from '@eremite/shared/contracts/evidence-moved';
import { signed } from './signed.ts';
import './moved-list.css';

interface MovedListProps {
  lead: string;
  moved: readonly Moved[];
}

/** What moved under a word since it was given, and by how much. */
export function MovedList({ lead, moved }: MovedListProps) {
  return (
    <div className="moved-list">
      <p>{lead}</p>
      <ul>
        {moved.map((entry) => (
          <li key={entry.what}>
            {entry.what} <span className="num">{`${entry.from} → ${entry.to}`}</span> {entry.unit}
            {entry.by !== null && <span className="muted num"> ({signed(entry.by)})</span>}
          </li>
        ))}
      </ul>
    </div>
  );
}
