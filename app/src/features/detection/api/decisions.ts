import { detection, type updateDetectionRequest } from '@eremite/shared/contracts/detection';
import type { DocketItem } from '@eremite/shared/contracts/docket';
import { listOf, type List } from '@eremite/shared/contracts/list';
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

/**
 * After a decision what is said of the detection is asked for anew. Lists that show it are so when one comes back to them:
 * asking for hundreds of rows after each key would keep the next decision waiting.
 *
 * @param isLeft whether one goes on to another detection, so that this one is asked for when one comes back to it
 */
export const askAnew = (client: QueryClient, detectionId: string, isLeft = false) => {
  return Promise.all([
    client.invalidateQueries({ queryKey: ['detection', detectionId], refetchType: isLeft ? 'none' : 'active' }),
    client.invalidateQueries({
      predicate: ({ queryKey }) => queryKey[0] === 'run' && queryKey[3] === detectionId,
      refetchType: isLeft ? 'none' : 'active',
    }),
    client.invalidateQueries({
      predicate: ({ queryKey }) =>
        (queryKey[0] === 'run' && queryKey[2] === 'verdicts') || queryKey[2] === 'docket' || queryKey[2] === 'overview',
      refetchType: 'none',
    }),
  ]);
};

/** Ticks a detection off in the lists that are held, or takes the tick away. */
export function markDecided(client: QueryClient, detectionId: string, reviewedByMe: boolean): void {
  client.setQueriesData<List<DocketItem>>(
    { predicate: ({ queryKey }) => isDocket(queryKey) },
    (page) =>
      page && {
        ...page,
        items: page.items.map((item) => (item.detectionId === detectionId ? { ...item, reviewedByMe } : item)),
      },
  );
}
const isDocket = (key: readonly unknown[]): boolean =>
  key[0] === 'survey' && key[2] === 'docket' && typeof key[3] === 'string' && key[3].startsWith('?');

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
