import { criteria } from '@eremite/shared/contracts/criteria';
import { listOf } from '@eremite/shared/contracts/list';
import { queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

/** Criteria of a survey, newest number first. */
export const criteriaListQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'criteria'],
    queryFn: ({ signal }) => call(listOf(criteria), `/surveys/${surveyId}/criteria?limit=200`, { signal }),
  });
