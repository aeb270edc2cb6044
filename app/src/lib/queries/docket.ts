import { listOf } from '@eremite/shared/contracts/list';
import { docketItem } from '@eremite/shared/contracts/review';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import { call } from '#lib/api-client.ts';

export type DocketItem = z.output<typeof docketItem>;

/** Detections waiting for review, in the order they should be looked at. */
export const docketQuery = (surveyId: string, search: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'docket', search],
    queryFn: ({ signal }) => call(listOf(docketItem), `/surveys/${surveyId}/docket${search}`, { signal }),
    placeholderData: keepPreviousData,
  });
