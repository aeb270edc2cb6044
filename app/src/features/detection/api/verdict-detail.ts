import { criteria } from '@eremite/shared/contracts/criteria';
import { detection } from '@eremite/shared/contracts/detection';
import { verdictDetail } from '@eremite/shared/contracts/verdict';
import { queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

/** Everything behind one verdict. */
export const verdictDetailQuery = (runId: string, detectionId: string) =>
  queryOptions({
    queryKey: ['run', runId, 'detection', detectionId],
    queryFn: ({ signal }) => call(verdictDetail, `/runs/${runId}/detections/${detectionId}`, { signal }),
    staleTime: 60_000,
  });

export const detectionQuery = (detectionId: string) =>
  queryOptions({
    queryKey: ['detection', detectionId],
    queryFn: ({ signal }) => call(detection, `/detections/${detectionId}`, { signal }),
  });

/** Criteria never change, so they are asked for once. */
export const criteriaQuery = (criteriaId: string) =>
  queryOptions({
    queryKey: ['criteria', criteriaId],
    queryFn: ({ signal }) => call(criteria, `/criteria/${criteriaId}`, { signal }),
    staleTime: Infinity,
  });
