import { Button } from '@blueprintjs/core';
import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { surveysQuery } from '#features/surveys/api/surveys.ts';
import { DeletedSurveys } from '#features/surveys/components/deleted-surveys.tsx';
import { NewSurveyDialog } from '#features/surveys/components/new-survey-dialog.tsx';
import { SurveyCard } from '#features/surveys/components/survey-card.tsx';
import { paths } from '#config/paths.ts';
import { meQuery } from '#lib/queries/me.ts';
import { useTitle } from '#lib/use-title.ts';
import '#features/surveys/components/surveys.css';

export const loader = (client: QueryClient) => () => client.ensureQueryData(surveysQuery());

export function Component() {
  const { data: me } = useSuspenseQuery(meQuery());
  const { data: surveys } = useSuspenseQuery(surveysQuery());
  const [isOpen, setOpen] = useState(false);
  const navigate = useNavigate();
  useTitle('Surveys');
  const ledTeams = me.teams.filter(({ role }) => role === 'lead');
  const create = ledTeams.length > 0 && <Button intent="primary" text="New survey" onClick={() => setOpen(true)} />;
  return (
    <main id="content" className="page">
      <div className="page__head">
        <div>
          <h1>Surveys</h1>
          <p className="page__lede">A survey holds one team’s detections, catalogues, criteria, runs and decisions.</p>
        </div>
        {create}
      </div>
      {surveys.items.length === 0 ? (
        <EmptyState title="No survey yet" action={create}>
          {ledTeams.length > 0
            ? 'Create the first one, then bring in the list of HI detections and the catalogues to search.'
            : 'You are in no team with a survey. Ask a team lead for an invitation.'}
        </EmptyState>
      ) : (
        <ul className="survey-cards">
          {surveys.items.map((survey) => (
            <SurveyCard key={survey.id} survey={survey} />
          ))}
        </ul>
      )}
      <DeletedSurveys />
      <NewSurveyDialog
        isOpen={isOpen}
        teams={ledTeams}
        onClose={() => setOpen(false)}
        onCreated={(survey) => void navigate(paths.survey(survey.id))}
      />
    </main>
  );
}
