import { meResponse } from '@eremite/shared/contracts/auth';
import { queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

/** Who is signed in. */
export const meQuery = () =>
  queryOptions({
    queryKey: ['me'],
    queryFn: ({ signal }) => call(meResponse, '/auth/me', { signal }),
    staleTime: 60_000,
  });
