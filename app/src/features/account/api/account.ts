import {
  createdToken,
  personalToken,
  type ChangePasswordRequest,
  type createTokenRequest,
} from '@eremite/shared/contracts/auth';
import { listOf } from '@eremite/shared/contracts/list';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { act, call } from '#lib/api-client.ts';

export const tokensQuery = () =>
  queryOptions({
    queryKey: ['tokens'],
    queryFn: ({ signal }) => call(listOf(personalToken), '/tokens', { signal }),
  });

export const useChangePassword = () =>
  useMutation({ mutationFn: (json: ChangePasswordRequest) => act('/auth/password', { method: 'POST', json }) });

export function useCreateToken() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (json: z.input<typeof createTokenRequest>) => call(createdToken, '/tokens', { method: 'POST', json }),
    onSuccess: () => client.invalidateQueries({ queryKey: ['tokens'] }),
  });
}

export function useRevokeToken() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: string) => act(`/tokens/${id}`, { method: 'DELETE' }),
    onSuccess: () => client.invalidateQueries({ queryKey: ['tokens'] }),
  });
}
