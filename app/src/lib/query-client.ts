import { QueryClient } from '@tanstack/react-query';
import { ApiError } from './api-error.ts';

/** One cache for the page. Refusals are final; only an unreachable service is asked again. */
export const createQueryClient = () =>
  new QueryClient({
    defaultOptions: {
      queries: {
        staleTime: 10_000,
        refetchOnWindowFocus: false,
        retry: (failures, error) => error instanceof ApiError && error.status === 0 && failures < 2,
      },
      mutations: { retry: false },
    },
  });
