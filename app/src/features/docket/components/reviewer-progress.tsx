import { useQuery } from '@tanstack/react-query';
import { count } from '#lib/format/number.ts';
import { reviewerProgressQuery } from '../api/assign.ts';
import './reviewer-progress.css';

/** How far each reviewer is with what was assigned; nothing of what was decided. */
export function ReviewerProgress({ surveyId }: { surveyId: string }) {
  const { data } = useQuery(reviewerProgressQuery(surveyId));
  if (!data || data.items.length === 0) return null;
  return (
    <ul className="reviewer-progress" aria-label="Progress of the reviewers on the latest run">
      {data.items.map(({ userId, name, assigned, reviewed, returned }) => (
        <li key={userId}>
          <span>{name}</span>
          <progress value={reviewed} max={assigned} aria-label={`${name}: ${reviewed} of ${assigned} reviewed`} />
          <span className="num small muted">
            {count(reviewed)} of {count(assigned)}
            {returned > 0 && `, ${count(returned)} came back`}
          </span>
        </li>
      ))}
    </ul>
  );
}
