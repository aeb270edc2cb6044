import { useSuspenseQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { surveyQuery } from '#lib/queries/survey.ts';

/** The survey of the page's address. The survey's loader has fetched it before anything below renders. */
export function useSurvey() {
  const surveyId = useParams()['surveyId']!;
  return useSuspenseQuery(surveyQuery(surveyId)).data;
}
