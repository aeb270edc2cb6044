import { survey, surveyOverview } from '@eremite/shared/contracts/survey';
import { queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

export const surveyQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId],
    queryFn: ({ signal }) => call(survey, `/surveys/${surveyId}`, { signal }),
  });

/** Counts and sky marks of the latest finished run. */
export const overviewQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'overview'],
    queryFn: ({ signal }) => call(surveyOverview, `/surveys/${surveyId}/overview`, { signal }),
  });
