import { surveyPlots } from '@eremite/shared/contracts/plot';
import { queryOptions } from '@tanstack/react-query';
import { API_BASE } from '#config/paths.ts';
import { call } from '#lib/api-client.ts';

/** Numbers behind the plots of a run; a run never changes, so they are asked for once. */
export const plotsQuery = (runId: string) =>
  queryOptions({
    queryKey: ['run', runId, 'plots'],
    queryFn: ({ signal }) => call(surveyPlots, `/runs/${runId}/plots`, { signal }),
    staleTime: Infinity,
    gcTime: 60_000,
  });

/** Address of the same numbers as a table. */
export const plotsTable = (runId: string, format: 'csv' | 'votable'): string =>
  `${API_BASE}/runs/${runId}/plots?format=${format}`;
