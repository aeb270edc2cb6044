import type { Run } from '@eremite/shared/contracts/run';
import { STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS } from '@eremite/shared/contracts/words';
import { Link } from 'react-router-dom';
import { StarlightWord, SurroundingsWord } from '#components/verdict-mark/verdict-word.tsx';
import { count } from '#lib/format/number.ts';
import './verdict-counts.css';

interface VerdictCountsProps {
  counts: Pick<NonNullable<Run['counts']>, 'starlight' | 'surroundings'>;
  /** Address of the detections with a verdict. */
  to: (filter: string) => string;
}

/** How many of each verdict; every number leads to its detections. */
export function VerdictCounts({ counts, to }: VerdictCountsProps) {
  return (
    <div className="verdict-counts">
      <ul aria-label="Starlight">
        {STARLIGHT_VERDICTS.map((verdict) => (
          <li key={verdict}>
            <Link to={to(`?starlight=${encodeURIComponent(verdict)}`)}>
              <StarlightWord verdict={verdict} />
              <b className="num">{count(counts.starlight[verdict] ?? 0)}</b>
            </Link>
          </li>
        ))}
      </ul>
      <ul aria-label="Surroundings">
        {SURROUNDINGS_VERDICTS.map((verdict) => (
          <li key={verdict}>
            <Link to={to(`?surroundings=${encodeURIComponent(verdict)}`)}>
              <SurroundingsWord verdict={verdict} />
              <b className="num">{count(counts.surroundings[verdict] ?? 0)}</b>
            </Link>
          </li>
        ))}
      </ul>
    </div>
  );
}
