import { meResponse, type SignInRequest } from '@eremite/shared/contracts/auth';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { act, call } from '#lib/api-client.ts';
import { meQuery } from '#lib/queries/me.ts';

/** Signs in and learns who it is; nothing of an earlier session stays in the cache. */
export function useSignIn() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: async (json: SignInRequest) => {
      await act('/auth/sign-in', { method: 'POST', json });
      return call(meResponse, '/auth/me');
    },
    onSuccess: (me) => {
      client.clear();
      client.setQueryData(meQuery().queryKey, me);
    },
  });
}
