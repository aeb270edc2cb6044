import { listOf } from '@eremite/shared/contracts/list';
import { docketItem, type DocketItem } from '@eremite/shared/contracts/docket';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

export type { DocketItem };

/** Detections waiting for review, in the order they should be looked at. */
export const docketQuery = (surveyId: string, search: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'docket', search],
    queryFn: ({ signal }) => call(listOf(docketItem), `/surveys/${surveyId}/docket${search}`, { signal }),
    placeholderData: keepPreviousData,
  });
