import { docketItem } from '@eremite/shared/contracts/docket';
import { listOf } from '@eremite/shared/contracts/list';
import { reviewerProgress } from '@eremite/shared/contracts/review';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { act, call } from '#lib/api-client.ts';
import { searchString } from '#lib/search-string.ts';

/** Most detections of one request, as the service takes them. */
const BATCH = 10_000;

export const reviewerProgressQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'docket', 'progress'],
    queryFn: ({ signal }) => call(listOf(reviewerProgress), `/surveys/${surveyId}/assignments?limit=1000`, { signal }),
  });

/** Every detection of the docket under a filter, over all its pages. */
async function matching(surveyId: string, filter: Record<string, string>): Promise<string[]> {
  const ids: string[] = [];
  let cursor: string | null = null;
  do {
    const search = searchString({ ...filter, limit: 1000, cursor });
    const page = await call(listOf(docketItem), `/surveys/${surveyId}/docket${search}`);
    ids.push(...page.items.map(({ detectionId }) => detectionId));
    cursor = page.nextCursor;
  } while (cursor !== null);
  return ids;
}

interface Assignment {
  userId: string;
  /** Those named, or all that a filter finds. */
  what: { detectionIds: string[] } | { filter: Record<string, string> };
}

/** Gives detections to a reviewer; answers how many. */
export function useAssign(surveyId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: async ({ userId, what }: Assignment) => {
      const ids = 'filter' in what ? await matching(surveyId, what.filter) : what.detectionIds;
      for (let from = 0; from < ids.length; from += BATCH) {
        const json = { detectionIds: ids.slice(from, from + BATCH), userId };
        await act(`/surveys/${surveyId}/assignments`, { method: 'POST', json });
      }
      return ids.length;
    },
    onSettled: () => client.invalidateQueries({ queryKey: ['survey', surveyId, 'docket'] }),
  });
}
