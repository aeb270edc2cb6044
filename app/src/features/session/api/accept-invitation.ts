import { invitationPreview, meResponse, type AcceptInvitationRequest } from '@eremite/shared/contracts/auth';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';
import { meQuery } from '#lib/queries/me.ts';

/** What an invitation's link is for. */
export const invitationPreviewQuery = (token: string) =>
  queryOptions({
    queryKey: ['invitation', token],
    queryFn: ({ signal }) =>
      call(invitationPreview, `/invitations/preview?token=${encodeURIComponent(token)}`, { signal }),
    retry: false,
  });

/** Joins the team and is signed in by it. */
export function useAcceptInvitation() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (json: AcceptInvitationRequest) => call(meResponse, '/invitations/accept', { method: 'POST', json }),
    onSuccess: (me) => {
      client.clear();
      client.setQueryData(meQuery().queryKey, me);
    },
  });
}
