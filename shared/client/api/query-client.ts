/** One query client for the life of the page, outside React (see session-store). */
import { QueryClient } from '@tanstack/react-query';
import { asProblem } from './problem';

/** How long a reply counts as fresh. */
export const STALE_MS = { live: 0, list: 10_000, reference: 60_000 } as const;

export const queryClient = new QueryClient({
  defaultOptions: {
    queries: {
      staleTime: STALE_MS.list,
      retry: (failures, error) => failures < 2 && asProblem(error).isRetryable,
      refetchOnWindowFocus: true,
    },
    mutations: { retry: false },
  },
});
