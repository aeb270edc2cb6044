import type { invitationRequest } from '@eremite/shared/contracts/auth';
import { invitation, outboxMail, teamMember } from '@eremite/shared/contracts/auth';
import { listOf } from '@eremite/shared/contracts/list';
import type { TeamRole } from '@eremite/shared/contracts/words';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { act, call } from '#lib/api-client.ts';

export const invitationsQuery = (teamId: string) =>
  queryOptions({
    queryKey: ['team', teamId, 'invitations'],
    queryFn: ({ signal }) => call(listOf(invitation), `/teams/${teamId}/invitations`, { signal }),
  });

export const outboxQuery = () =>
  queryOptions({
    queryKey: ['outbox'],
    queryFn: ({ signal }) => call(listOf(outboxMail), '/outbox', { signal }),
  });

function useTeamChange<T, R>(teamId: string, change: (value: T) => Promise<R>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: change,
    onSuccess: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: ['team', teamId] }),
        client.invalidateQueries({ queryKey: ['outbox'] }),
      ]),
  });
}

export const useInvite = (teamId: string) =>
  useTeamChange(teamId, (json: z.input<typeof invitationRequest>) =>
    call(invitation, `/teams/${teamId}/invitations`, { method: 'POST', json }),
  );
export const useRevoke = (teamId: string) =>
  useTeamChange(teamId, (id: string) => act(`/teams/${teamId}/invitations/${id}`, { method: 'DELETE' }));
export const useSetRole = (teamId: string) =>
  useTeamChange(teamId, ({ userId, role }: { userId: string; role: TeamRole }) =>
    call(teamMember, `/teams/${teamId}/members/${userId}`, { method: 'PATCH', json: { role } }),
  );
export const useRemoveMember = (teamId: string) =>
  useTeamChange(teamId, (userId: string) => act(`/teams/${teamId}/members/${userId}`, { method: 'DELETE' }));
