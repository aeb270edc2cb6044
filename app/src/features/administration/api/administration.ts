import { account, adminJob, storage } from '@eremite/shared/contracts/admin';
import { team } from '@eremite/shared/contracts/auth';
import { listOf } from '@eremite/shared/contracts/list';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

export const accountsQuery = () =>
  queryOptions({
    queryKey: ['admin', 'accounts'],
    queryFn: ({ signal }) => call(listOf(account), '/admin/accounts?limit=500', { signal }),
  });
export const jobsQuery = () =>
  queryOptions({
    queryKey: ['admin', 'jobs'],
    queryFn: ({ signal }) => call(listOf(adminJob), '/admin/jobs?limit=50', { signal }),
    refetchInterval: 5000,
  });
export const storageQuery = () =>
  queryOptions({
    queryKey: ['admin', 'storage'],
    queryFn: ({ signal }) => call(storage, '/admin/storage', { signal }),
  });
export const allTeamsQuery = () =>
  queryOptions({ queryKey: ['teams'], queryFn: ({ signal }) => call(listOf(team), '/teams?limit=500', { signal }) });

export function useSetDisabled() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ id, disabled }: { id: string; disabled: boolean }) =>
      call(account, `/admin/accounts/${id}`, { method: 'PATCH', json: { disabled } }),
    onSuccess: () => client.invalidateQueries({ queryKey: ['admin', 'accounts'] }),
  });
}

export function useCreateTeam() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (name: string) => call(team, '/teams', { method: 'POST', json: { name } }),
    onSuccess: () =>
      Promise.all([client.invalidateQueries({ queryKey: ['teams'] }), client.invalidateQueries({ queryKey: ['me'] })]),
  });
}
