import { listOf } from '@eremite/shared/contracts/list';
import { run } from '@eremite/shared/contracts/run';
import { queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

/** Runs of a survey, newest first. */
export const runsQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'runs'],
    queryFn: ({ signal }) => call(listOf(run), `/surveys/${surveyId}/runs?limit=200`, { signal }),
  });

export const runQuery = (runId: string) =>
  queryOptions({
    queryKey: ['run', runId],
    queryFn: ({ signal }) => call(run, `/runs/${runId}`, { signal }),
  });

/** The run a page speaks of: the one named in its address, else the newest finished one. */
export function chosenRun<R extends { id: string; state: string }>(runs: readonly R[], named: string | null) {
  return runs.find((entry) => entry.id === named) ?? runs.find((entry) => entry.state === 'done');
}
