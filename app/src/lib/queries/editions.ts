import { edition, editionDetail } from '@eremite/shared/contracts/edition';
import { listOf } from '@eremite/shared/contracts/list';
import { queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

/** Editions of a survey, newest first; asked anew while one is being packed. */
export const editionsQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'editions'],
    queryFn: ({ signal }) => call(listOf(edition), `/surveys/${surveyId}/editions?limit=200`, { signal }),
    refetchInterval: (query) => (query.state.data?.items.some(({ state }) => state === 'packing') ? 1000 : false),
  });

export const editionQuery = (editionId: string) =>
  queryOptions({
    queryKey: ['edition', editionId],
    queryFn: ({ signal }) => call(editionDetail, `/editions/${editionId}`, { signal }),
    refetchInterval: (query) => (query.state.data?.state === 'packing' ? 1000 : false),
  });
