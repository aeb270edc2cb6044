import { shortlist, type PutShortlistRequest, type Shortlist } from '@eremite/shared/contracts/shortlist';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

export const shortlistQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'shortlist'],
    queryFn: ({ signal }) => call(shortlist, `/surveys/${surveyId}/shortlist`, { signal }),
  });

/** Writes the whole list; refused with 412 when someone else changed it since it was read. */
export function useSaveShortlist(surveyId: string) {
  const client = useQueryClient();
  const { queryKey } = shortlistQuery(surveyId);
  return useMutation({
    mutationFn: ({ version, ...json }: PutShortlistRequest & { version: number }) =>
      call(shortlist, `/surveys/${surveyId}/shortlist`, {
        method: 'PUT',
        json,
        headers: { 'if-match': `"${version}"` },
      }),
    onSuccess: (saved: Shortlist) => client.setQueryData(queryKey, saved),
    onError: () => client.invalidateQueries({ queryKey }),
  });
}

export const entriesOf = ({ entries }: Shortlist): PutShortlistRequest['entries'] =>
  entries.map(({ detectionId, reason, nullResult }) => ({ detectionId, reason, nullResult }));
