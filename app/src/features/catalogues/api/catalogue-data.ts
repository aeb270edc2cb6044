import { catalogueMagnitudes, catalogueRow } from '@eremite/shared/contracts/catalogue';
import { sidelinedRow } from '@eremite/shared/contracts/intake';
import { listOf } from '@eremite/shared/contracts/list';
import { keepPreviousData, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { act, call } from '#lib/api-client.ts';
import { searchString } from '#lib/search-string.ts';

export const magnitudesQuery = (catalogueId: string) =>
  queryOptions({
    queryKey: ['catalogue', catalogueId, 'magnitudes'],
    queryFn: ({ signal }) => call(catalogueMagnitudes, `/catalogues/${catalogueId}/magnitudes`, { signal }),
    staleTime: Infinity,
  });

export const rowsQuery = (catalogueId: string, cursor: string | null) =>
  queryOptions({
    queryKey: ['catalogue', catalogueId, 'rows', cursor],
    queryFn: ({ signal }) =>
      call(listOf(catalogueRow), `/catalogues/${catalogueId}/rows${searchString({ limit: 200, cursor })}`, { signal }),
    placeholderData: keepPreviousData,
  });

export const PAGE_OF_SIDELINED = 100;

export const sidelinedQuery = (catalogueId: string, cursor: string | null) =>
  queryOptions({
    queryKey: ['catalogue', catalogueId, 'sidelined', cursor],
    queryFn: ({ signal }) =>
      call(
        listOf(sidelinedRow),
        `/catalogues/${catalogueId}/sidelined${searchString({ limit: PAGE_OF_SIDELINED, cursor })}`,
        { signal },
      ),
    placeholderData: keepPreviousData,
  });

export function useRemoveCatalogue(surveyId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (catalogueId: string) => act(`/catalogues/${catalogueId}`, { method: 'DELETE' }),
    onSuccess: () => client.invalidateQueries({ queryKey: ['survey', surveyId] }),
  });
}
