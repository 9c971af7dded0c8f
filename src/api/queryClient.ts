/** The cache of what the server said. */
import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { isProblem, ProblemError } from './problem.ts';

/** A fault that trying again may mend: no connection, or the server is starting. */
function isPassing(fault: unknown): boolean {
  return fault instanceof ProblemError && (fault.status === 0 || fault.status >= 502);
}

/**
 * The cache. `onSignedOut` is called where the server no longer knows who asks, which ends no page:
 * what is being written there must not be lost.
 */
export function createQueryClient(onSignedOut: () => void = () => undefined): QueryClient {
  const onError = (fault: Error) => {
    if (!isProblem(fault, 'not-signed-in')) return;
    void client.invalidateQueries({ queryKey: keys.session });
    onSignedOut();
  };
  const client = new QueryClient({
    queryCache: new QueryCache({ onError }),
    mutationCache: new MutationCache({ onError }),
    defaultOptions: {
      queries: {
        staleTime: 15_000,
        retry: (failures, fault) => failures < 3 && isPassing(fault),
        retryDelay: (failures) => Math.min(4000, 500 * 2 ** failures),
      },
      mutations: { retry: false },
    },
  });
  return client;
}

/** The keys under which resources are kept. */
export const keys = {
  session: ['session'] as const,
  desk: ['desk'] as const,
  group: (groupId: string) => ['group', groupId] as const,
  notebook: (notebookId: string) => ['notebook', notebookId] as const,
  model: (modelId: string) => ['model', modelId] as const,
  draft: (modelId: string) => ['model', modelId, 'draft'] as const,
  versions: (modelId: string) => ['model', modelId, 'versions'] as const,
  version: (modelId: string, number: number) => ['model', modelId, 'version', number] as const,
};
