import { QueryCache, QueryClient } from '@tanstack/react-query';
import { ProblemError } from './problem-error.ts';

/** Answers that another try cannot change. */
const isFinal = (error: Error) => error instanceof ProblemError && error.status >= 400 && error.status < 500;

/**
 * Keeps nothing. On the server this module serves everybody: what one reader's page was drawn from must never be found
 * by the page of another.
 */
class ForgetfulCache extends QueryCache {
  override get(): undefined {
    return undefined;
  }
  override add(): void {}
}

/** The one cache of server answers. Each island is a React root of its own; all import this client. */
export const queryClient = new QueryClient({
  ...(typeof window === 'undefined' ? { queryCache: new ForgetfulCache() } : {}),
  defaultOptions: {
    queries: { staleTime: 30_000, retry: (failures, error) => failures < 2 && !isFinal(error) },
    mutations: { retry: false },
  },
});
