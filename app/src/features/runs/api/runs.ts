import { runAccepted, runDifference, type createRunRequest } from '@eremite/shared/contracts/run';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { call } from '#lib/api-client.ts';

export function useStartRun(surveyId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (json: z.input<typeof createRunRequest>) =>
      call(runAccepted, `/surveys/${surveyId}/runs`, { method: 'POST', json }),
    onSuccess: () => client.invalidateQueries({ queryKey: ['survey', surveyId] }),
  });
}

export type RunDifference = z.output<typeof runDifference>;

export const differenceQuery = (runId: string, from: string) =>
  queryOptions({
    queryKey: ['run', runId, 'difference', from],
    queryFn: ({ signal }) => call(runDifference, `/runs/${runId}/difference?from=${from}`, { signal }),
    staleTime: Infinity,
  });

/** Whether a verdict itself changed, not only the numbers behind it. */
export const hasOtherWords = ({ starlight, surroundings }: RunDifference['changed'][number]): boolean =>
  starlight[0] !== starlight[1] || surroundings[0] !== surroundings[1];
