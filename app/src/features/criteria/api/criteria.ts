import { criteria, type CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';
import { criteriaListQuery } from '#lib/queries/criteria.ts';

export const criteriaQuery = (criteriaId: string) =>
  queryOptions({
    queryKey: ['criteria', criteriaId],
    queryFn: ({ signal }) => call(criteria, `/criteria/${criteriaId}`, { signal }),
    staleTime: Infinity,
  });

/** Saves as the next number; criteria once saved never change. */
export function useSaveCriteria(surveyId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (json: { settings: CriteriaSettings; note: string }) =>
      call(criteria, `/surveys/${surveyId}/criteria`, { method: 'POST', json }),
    onSuccess: () => client.invalidateQueries({ queryKey: criteriaListQuery(surveyId).queryKey }),
  });
}
