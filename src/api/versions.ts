/** Versions of a model and their derivations. */
import {
  queryOptions,
  useMutation,
  useQueries,
  useQuery,
  useQueryClient,
} from '@tanstack/react-query';
import type { QueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { versionSchema, versionSummarySchema } from '../../shared/contracts/models.ts';
import type { DerivationState, Freeze } from '../../shared/contracts/models.ts';
import { modelPath } from './models.ts';
import { keys } from './queryClient.ts';
import { command, request } from './request.ts';

/** Whether nothing more is going to happen by itself. */
export function isSettled(state: DerivationState): boolean {
  return state === 'complete' || state === 'failed' || state === 'cancelled';
}

/** All versions, the latest first. */
export function useVersions(modelId: string) {
  return useQuery({
    queryKey: keys.versions(modelId),
    queryFn: async ({ signal }) => {
      const versions = await request(
        z.array(versionSummarySchema),
        `${modelPath(modelId)}/versions`,
        { signal },
      );
      return versions.sort((a, b) => b.number - a.number);
    },
  });
}

export function versionQuery(modelId: string, number: number) {
  return queryOptions({
    queryKey: keys.version(modelId, number),
    queryFn: ({ signal }) =>
      request(versionSchema, `${modelPath(modelId)}/versions/${number}`, { signal }),
    enabled: number > 0,
    // A version never changes again; its derivation is followed by events.
    staleTime: (query) =>
      query.state.data && isSettled(query.state.data.derivation.state) ? Infinity : 15_000,
  });
}

/** One version with its source and, once derived, its result. */
export function useVersion(modelId: string, number: number) {
  return useQuery(versionQuery(modelId, number));
}

/** Two versions at once, to compare them; number 0 stands for none. */
export function useVersionPair(modelId: string, earlier: number, later: number) {
  return useQueries({ queries: [versionQuery(modelId, earlier), versionQuery(modelId, later)] });
}

async function refresh(client: QueryClient, modelId: string): Promise<void> {
  await Promise.all([
    client.invalidateQueries({ queryKey: keys.model(modelId), exact: true }),
    client.invalidateQueries({ queryKey: keys.versions(modelId) }),
    client.invalidateQueries({ queryKey: ['model', modelId, 'version'] }),
    client.invalidateQueries({ queryKey: keys.desk }),
    client.invalidateQueries({ queryKey: ['notebook'] }),
  ]);
}

/**
 * Freezes the draft of a revision as the next version. A formulation at fault throws a
 * ProblemError of kind `formulation-at-fault` whose problem carries `diagnostics`.
 */
export function useFreeze(modelId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: Freeze) =>
      request(versionSummarySchema, `${modelPath(modelId)}/versions`, { method: 'POST', body }),
    onSuccess: () => refresh(client, modelId),
  });
}

export function useCancelDerivation(modelId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (number: number) =>
      command(`${modelPath(modelId)}/versions/${number}/derivation/cancellation`, {
        method: 'POST',
      }),
    onSettled: () => refresh(client, modelId),
  });
}

export function useDeriveAgain(modelId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (number: number) =>
      command(`${modelPath(modelId)}/versions/${number}/derivation`, { method: 'POST' }),
    onSettled: () => refresh(client, modelId),
  });
}
