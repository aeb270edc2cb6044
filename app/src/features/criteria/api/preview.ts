import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { preview } from '@eremite/shared/contracts/preview';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

/** What a few detections would become under criteria that are still being edited; nothing of it is kept. */
export const previewQuery = (surveyId: string, settings: CriteriaSettings, detectionIds: readonly string[]) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'preview', settings, detectionIds],
    queryFn: ({ signal }) =>
      call(preview, `/surveys/${surveyId}/preview`, { method: 'POST', json: { settings, detectionIds }, signal }),
    enabled: detectionIds.length > 0,
    placeholderData: keepPreviousData,
    staleTime: 60_000,
    retry: false,
  });
