import { teamMember } from '@eremite/shared/contracts/auth';
import { listOf } from '@eremite/shared/contracts/list';
import { queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

export const membersQuery = (teamId: string) =>
  queryOptions({
    queryKey: ['team', teamId, 'members'],
    queryFn: ({ signal }) => call(listOf(teamMember), `/teams/${teamId}/members`, { signal }),
  });
