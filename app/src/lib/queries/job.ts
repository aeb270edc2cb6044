import { job } from '@eremite/shared/contracts/job';
import { queryOptions } from '@tanstack/react-query';
import { act, call } from '#lib/api-client.ts';

const isOver = (state: string | undefined) => state === 'done' || state === 'failed' || state === 'cancelled';

/** State of a piece of long work, asked anew each half second until it is over. */
export const jobQuery = (jobId: string) =>
  queryOptions({
    queryKey: ['job', jobId],
    queryFn: ({ signal }) => call(job, `/jobs/${jobId}`, { signal }),
    refetchInterval: (query) => (isOver(query.state.data?.state) ? false : 500),
  });

export const cancelJob = (jobId: string) => act(`/jobs/${jobId}`, { method: 'DELETE' });
