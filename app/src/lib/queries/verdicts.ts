import { listOf } from '@eremite/shared/contracts/list';
import { verdictItem } from '@eremite/shared/contracts/verdict';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

/** One page of a run's verdicts; `search` is a query string of filters, order and place. */
export const verdictsQuery = (runId: string, search: string) =>
  queryOptions({
    queryKey: ['run', runId, 'verdicts', search],
    queryFn: ({ signal }) => call(listOf(verdictItem), `/runs/${runId}/verdicts${search}`, { signal }),
    placeholderData: keepPreviousData,
  });
