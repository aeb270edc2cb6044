import { Link } from 'react-router-dom';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { paths } from '#config/paths.ts';

export function NotFound() {
  return (
    <div className="page">
      <EmptyState title="There is no such page" action={<Link to={paths.surveys()}>To the surveys</Link>}>
        The address may be mistyped, or it belongs to a survey you are not a member of.
      </EmptyState>
    </div>
  );
}
