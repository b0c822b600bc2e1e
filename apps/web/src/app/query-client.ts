import { QueryClient } from '@tanstack/react-query';
import { ProblemError } from '../lib/api-client.js';

/** Refusals are final; only a line that is down is tried again. */
export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        staleTime: 15_000,
        retry: (count, error) => count < 2 && error instanceof ProblemError && error.problem === null,
      },
      mutations: { retry: false },
    },
  });
}
