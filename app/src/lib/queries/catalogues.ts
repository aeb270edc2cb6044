import { catalogue } from '@eremite/shared/contracts/catalogue';
import { listOf } from '@eremite/shared/contracts/list';
import { queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

export const cataloguesQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'catalogues'],
    queryFn: ({ signal }) => call(listOf(catalogue), `/surveys/${surveyId}/catalogues?limit=500`, { signal }),
  });

export const catalogueQuery = (catalogueId: string) =>
  queryOptions({
    queryKey: ['catalogue', catalogueId],
    queryFn: ({ signal }) => call(catalogue, `/catalogues/${catalogueId}`, { signal }),
  });
