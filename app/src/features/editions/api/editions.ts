import {
  createdGuestLink,
  editionDetail,
  editionDifference,
  guestLink,
  sharedEdition,
  type CreateGuestLinkRequest,
} from '@eremite/shared/contracts/edition';
import { jobAccepted } from '@eremite/shared/contracts/job';
import { listOf } from '@eremite/shared/contracts/list';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { act, call } from '#lib/api-client.ts';
import { editionsQuery } from '#lib/queries/editions.ts';

/** Freezes the shortlist as it was last seen; refused with 412 when someone changed it since. */
export function useFreeze(surveyId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ note, version }: { note: string; version: number }) =>
      call(editionDetail, `/surveys/${surveyId}/editions`, {
        method: 'POST',
        json: { note },
        headers: { 'if-match': `"${version}"` },
      }),
    onSuccess: () => client.invalidateQueries(editionsQuery(surveyId)),
  });
}

export const useReplay = (editionId: string) =>
  useMutation({ mutationFn: () => call(jobAccepted, `/editions/${editionId}/replay`, { method: 'POST' }) });

export const differenceQuery = (editionId: string, fromId: string) =>
  queryOptions({
    queryKey: ['edition', editionId, 'difference', fromId],
    queryFn: ({ signal }) => call(editionDifference, `/editions/${editionId}/difference?from=${fromId}`, { signal }),
  });

export const guestLinksQuery = (editionId: string) =>
  queryOptions({
    queryKey: ['edition', editionId, 'links'],
    queryFn: ({ signal }) => call(listOf(guestLink), `/editions/${editionId}/links?limit=200`, { signal }),
  });

export function useMakeLink(editionId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (json: CreateGuestLinkRequest) =>
      call(createdGuestLink, `/editions/${editionId}/links`, { method: 'POST', json }),
    onSuccess: () => client.invalidateQueries(guestLinksQuery(editionId)),
  });
}

export function useRevokeLink(editionId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (linkId: string) => act(`/links/${linkId}`, { method: 'DELETE' }),
    onSuccess: () => client.invalidateQueries(guestLinksQuery(editionId)),
  });
}

/** What the holder of a link sees; a link that is over is not asked again. */
export const sharedQuery = (token: string) =>
  queryOptions({
    queryKey: ['shared', token],
    queryFn: ({ signal }) => call(sharedEdition, `/shared/${encodeURIComponent(token)}`, { signal }),
    retry: false,
  });
