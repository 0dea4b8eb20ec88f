import { QueryClient } from '@tanstack/react-query';
import { ProblemError } from './problem-error';

/** Answers that another try cannot change. */
const isFinal = (error: Error) => error instanceof ProblemError && error.status >= 400 && error.status < 500;

/** The one cache of server answers. Each island is a React root of its own; all import this client. */
export const queryClient = new QueryClient({
  defaultOptions: {
    queries: { staleTime: 30_000, retry: (failures, error) => failures < 2 && !isFinal(error) },
    mutations: { retry: false },
  },
});
