import { whatIf } from '@eremite/shared/contracts/what-if';
import { queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

/** The verdict at other distances, by the run's own criteria and tables. A run never changes, so neither does this. */
export const whatIfQuery = (runId: string, detectionId: string) =>
  queryOptions({
    queryKey: ['run', runId, 'detection', detectionId, 'what-if'],
    queryFn: ({ signal }) => call(whatIf, `/runs/${runId}/detections/${detectionId}/what-if`, { signal }),
    staleTime: Infinity,
    gcTime: 30_000,
  });
