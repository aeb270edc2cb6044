import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { Link, type LoaderFunctionArgs } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { EditionTable } from '#features/editions/components/edition-table.tsx';
import { paths } from '#config/paths.ts';
import { editionsQuery } from '#lib/queries/editions.ts';
import { mayLead } from '#lib/role.ts';
import { useTitle } from '#lib/use-title.ts';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(editionsQuery(params['surveyId']!));

export function Component() {
  const survey = useSurvey();
  const { data: editions } = useSuspenseQuery(editionsQuery(survey.id));
  useTitle('Editions', survey.name);
  return (
    <div className="page stack">
      <div className="page__head" style={{ marginBottom: 0 }}>
        <div>
          <h1>Editions</h1>
          <p className="page__lede">
            Frozen shortlists with everything needed to repeat them. An edition never changes; a new one supersedes it.
          </p>
        </div>
      </div>
      {editions.items.length === 0 ? (
        <EmptyState title="No edition yet" action={<Link to={paths.shortlist(survey.id)}>To the shortlist</Link>}>
          {mayLead(survey.role)
            ? 'Put settled detections on the shortlist and freeze it there.'
            : 'The lead freezes the shortlist when it is ready.'}
        </EmptyState>
      ) : (
        <EditionTable surveyId={survey.id} editions={editions.items} />
      )}
      <Caution />
    </div>
  );
}
