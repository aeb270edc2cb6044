import { detection, type updateDetectionRequest } from '@eremite/shared/contracts/detection';
import { listOf } from '@eremite/shared/contracts/list';
import { notePhrases } from '@eremite/shared/contracts/note';
import { remark } from '@eremite/shared/contracts/remark';
import { doubtWord, override, review, settlement } from '@eremite/shared/contracts/review';
import { queryOptions, useMutation, useQueryClient, type QueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { act, call } from '#lib/api-client.ts';

const ofDetection = <T extends z.ZodType>(detectionId: string, what: string, item: T) =>
  queryOptions({
    queryKey: ['detection', detectionId, what],
    queryFn: ({ signal }) => call(listOf(item), `/detections/${detectionId}/${what}?limit=500`, { signal }),
    staleTime: 60_000,
  });

export const reviewsQuery = (id: string) => ofDetection(id, 'reviews', review);
export const overridesQuery = (id: string) => ofDetection(id, 'overrides', override);
export const doubtWordsQuery = (id: string) => ofDetection(id, 'doubt-words', doubtWord);
export const remarksQuery = (id: string) => ofDetection(id, 'remarks', remark);
export const settlementQuery = (id: string) =>
  queryOptions({
    queryKey: ['detection', id, 'settlements'],
    queryFn: ({ signal }) =>
      call(z.object({ settlement: settlement.nullable() }), `/detections/${id}/settlements`, { signal }),
    staleTime: 60_000,
  });

export const notePhrasesQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'note-phrases'],
    queryFn: ({ signal }) => call(notePhrases, `/surveys/${surveyId}/note-phrases`, { signal }),
    staleTime: 300_000,
  });

/** After a decision all that shows it is asked for anew: this detection, the lists, the docket. */
export const askAnew = (client: QueryClient, detectionId: string) =>
  Promise.all([
    client.invalidateQueries({ queryKey: ['detection', detectionId] }),
    client.invalidateQueries({
      predicate: ({ queryKey }) =>
        (queryKey[0] === 'run' && (queryKey[2] === 'verdicts' || queryKey[3] === detectionId)) ||
        queryKey[2] === 'docket' ||
        queryKey[2] === 'overview',
    }),
  ]);

function useAct<T>(detectionId: string, work: (value: T) => Promise<unknown>) {
  const client = useQueryClient();
  return useMutation({ mutationFn: work, onSettled: () => askAnew(client, detectionId) });
}

/** Takes something back by its path: a review, an override, a word on a doubt. */
export const useTakeBack = (id: string) =>
  useAct(id, ({ path, note }: { path: string; note?: string }) =>
    act(path, { method: 'DELETE', ...(note !== undefined && { json: { note } }) }),
  );
export const useSetDistance = (id: string) =>
  useAct(id, (json: z.input<typeof updateDetectionRequest>) =>
    call(detection, `/detections/${id}`, { method: 'PATCH', json }),
  );
