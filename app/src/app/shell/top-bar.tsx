import type { Me } from '@eremite/shared/contracts/auth';
import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { paths } from '#config/paths.ts';
import { surveyQuery } from '#lib/queries/survey.ts';
import { UserMenu } from './user-menu.tsx';

/** Mark, where one is, which run is the latest, who one is. */
export function TopBar({ me }: { me: Me }) {
  const surveyId = useParams()['surveyId'];
  const { data: survey } = useQuery({ ...surveyQuery(surveyId ?? ''), enabled: surveyId !== undefined });
  const run = survey?.latestRun;
  return (
    <header className="shell__bar">
      <Link to={paths.surveys()} className="wordmark" aria-label="Eremite, to the surveys">
        <svg width="22" height="18" viewBox="0 0 22 18" aria-hidden="true">
          <circle cx="8" cy="9" r="5.6" className="wordmark__ring" />
          <path d="M17 15.5l2.4-7" className="wordmark__stroke" />
        </svg>
        eremite
      </Link>
      <nav aria-label="Place" className="crumbs">
        <Link to={paths.surveys()}>Surveys</Link>
        {survey && (
          <>
            <span aria-hidden="true">/</span>
            <Link to={paths.survey(survey.id)} className="crumbs__here">
              {survey.name}
            </Link>
          </>
        )}
      </nav>
      <span className="grow" />
      {run && survey && (
        <Link to={paths.run(survey.id, run.id)} className="shell__run mono">
          run {run.number}
          {run.state === 'done' ? '' : ` · ${run.state}`}
        </Link>
      )}
      <UserMenu me={me} />
    </header>
  );
}
