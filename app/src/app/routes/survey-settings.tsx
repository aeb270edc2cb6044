import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { Navigate, type LoaderFunctionArgs } from 'react-router-dom';
import { Panel } from '#components/panel/panel.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { editedSurveyQuery } from '#features/surveys/api/survey-settings.ts';
import { DeleteSurvey } from '#features/surveys/components/delete-survey.tsx';
import { SurveySettingsForm } from '#features/surveys/components/survey-settings-form.tsx';
import { paths } from '#config/paths.ts';
import { mayLead } from '#lib/role.ts';
import { useTitle } from '#lib/use-title.ts';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(editedSurveyQuery(params['surveyId']!));

export function Component() {
  const survey = useSurvey();
  const { data } = useSuspenseQuery(editedSurveyQuery(survey.id));
  useTitle('Settings', survey.name);
  if (!mayLead(survey.role)) return <Navigate to={paths.survey(survey.id)} replace />;
  return (
    <div className="page page--narrow stack">
      <h1>Settings</h1>
      <Panel title="The survey">
        <SurveySettingsForm key={data.etag} survey={data.survey} etag={data.etag} />
      </Panel>
      <Panel title="Deletion">
        <DeleteSurvey survey={survey} />
      </Panel>
    </div>
  );
}
