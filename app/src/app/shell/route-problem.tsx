import { Link, useRouteError } from 'react-router-dom';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { paths } from '#config/paths.ts';
import { ApiError } from '#lib/api-error.ts';
import { NotFound } from './not-found.tsx';

/** What a page shows when it could not be loaded or broke while it was drawn. */
export function RouteProblem() {
  const error = useRouteError();
  const status = error instanceof ApiError ? error.status : (error as { status?: number } | null)?.status;
  if (status === 404) return <NotFound />;
  return (
    <div className="page page--narrow stack">
      <ProblemCallout error={error instanceof Error ? error : new Error('This page could not be shown.')} />
      <p>
        <a href="">Try again</a> or go <Link to={paths.surveys()}>to the surveys</Link>.
      </p>
    </div>
  );
}
