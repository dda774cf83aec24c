import { QueryClient } from '@tanstack/react-query';
import { ApiProblem } from './problem';

/** Only what may be different a second later is asked again: no answer, or the server's own failure. */
export function isWorthRetrying(failures: number, error: unknown): boolean {
  if (failures >= 2) return false;
  return !(error instanceof ApiProblem) || error.status === 0 || error.status >= 500;
}

export const queryClient = new QueryClient({
  defaultOptions: {
    queries: { staleTime: 10_000, retry: isWorthRetrying, refetchOnWindowFocus: true },
    mutations: { retry: false },
  },
});
