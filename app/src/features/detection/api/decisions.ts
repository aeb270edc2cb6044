import { detection, type updateDetectionRequest } from '@eremite/shared/contracts/detection';
import { listOf } from '@eremite/shared/contracts/list';
import {
  override,
  review,
  type createOverrideRequest,
  type createReviewRequest,
  type settleRequest,
} from '@eremite/shared/contracts/review';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { act, call } from '#lib/api-client.ts';

export const reviewsQuery = (detectionId: string) =>
  queryOptions({
    queryKey: ['detection', detectionId, 'reviews'],
    queryFn: ({ signal }) => call(listOf(review), `/detections/${detectionId}/reviews`, { signal }),
  });

export const overridesQuery = (detectionId: string) =>
  queryOptions({
    queryKey: ['detection', detectionId, 'overrides'],
    queryFn: ({ signal }) => call(listOf(override), `/detections/${detectionId}/overrides`, { signal }),
  });

/** After a decision all that shows it is asked for anew: this detection, the lists, the docket. */
function useDecision<T, R>(detectionId: string, decide: (value: T) => Promise<R>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: decide,
    onSuccess: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: ['detection', detectionId] }),
        client.invalidateQueries({ predicate: ({ queryKey }) => queryKey[0] === 'run' || queryKey[2] === 'docket' }),
        client.invalidateQueries({ predicate: ({ queryKey }) => queryKey[2] === 'overview' }),
      ]),
  });
}

export const useReview = (id: string) =>
  useDecision(id, (json: z.input<typeof createReviewRequest>) =>
    call(review, `/detections/${id}/reviews`, { method: 'POST', json }),
  );
export const useOverride = (id: string) =>
  useDecision(id, (json: z.input<typeof createOverrideRequest>) =>
    call(override, `/detections/${id}/overrides`, { method: 'POST', json }),
  );
export const useWithdraw = (id: string) =>
  useDecision(id, ({ overrideId, note }: { overrideId: string; note: string }) =>
    act(`/overrides/${overrideId}`, { method: 'DELETE', json: { note } }),
  );
export const useSettle = (id: string) =>
  useDecision(id, (json: z.input<typeof settleRequest>) =>
    act(`/detections/${id}/settlements`, { method: 'POST', json }),
  );
export const useSetDistance = (id: string) =>
  useDecision(id, (json: z.input<typeof updateDetectionRequest>) =>
    call(detection, `/detections/${id}`, { method: 'PATCH', json }),
  );
