import type { QueryClient } from '@tanstack/react-query';
import { Outlet, type LoaderFunctionArgs } from 'react-router-dom';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { OutboxBar } from '#components/survey-events/outbox-bar.tsx';
import { useSurveyEvents } from '#components/survey-events/use-survey-events.ts';
import { surveyQuery } from '#lib/queries/survey.ts';
import { SurveyNav } from './survey-nav.tsx';

export const surveyLoader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(surveyQuery(params['surveyId']!));

export function SurveyFrame() {
  const survey = useSurvey();
  useSurveyEvents(survey.id);
  return (
    <>
      <SurveyNav survey={survey} />
      <main id="content" tabIndex={-1} className="shell__content">
        <Outlet />
      </main>
      <OutboxBar />
    </>
  );
}
