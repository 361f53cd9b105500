import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { ProblemError } from './problem-error.ts';

const FRESH_MS = 30_000;

/**
 * The cache of replies. A refusal is not asked again; silence is, twice. `onSignedOut` is called
 * when the server no longer knows who is asking.
 */
export function makeQueryClient(onSignedOut: () => void): QueryClient {
  const onError = (error: Error): void => {
    if (error instanceof ProblemError && error.problem.code === 'not-signed-in') onSignedOut();
  };
  return new QueryClient({
    queryCache: new QueryCache({ onError }),
    mutationCache: new MutationCache({ onError }),
    defaultOptions: {
      queries: {
        staleTime: FRESH_MS,
        retry: (failures, error) => !(error instanceof ProblemError) && failures < 2,
      },
    },
  });
}
