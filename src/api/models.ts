/** Models and their drafts. */
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { draftConflictSchema, draftSchema, modelSchema } from '../../shared/contracts/models.ts';
import type { Draft, SaveDraft } from '../../shared/contracts/models.ts';
import { isProblem } from './problem.ts';
import { keys } from './queryClient.ts';
import { command, request } from './request.ts';

export const modelPath = (modelId: string) => `/api/models/${encodeURIComponent(modelId)}`;

export function useModel(modelId: string) {
  return useQuery({
    queryKey: keys.model(modelId),
    queryFn: ({ signal }) => request(modelSchema, modelPath(modelId), { signal }),
  });
}

export function useRenameModel(modelId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (title: string) =>
      command(modelPath(modelId), { method: 'PATCH', body: { title } }),
    onSuccess: async () => {
      await Promise.all([
        client.invalidateQueries({ queryKey: keys.model(modelId), exact: true }),
        client.invalidateQueries({ queryKey: keys.desk }),
        client.invalidateQueries({ queryKey: ['notebook'] }),
      ]);
    },
  });
}

/** The draft as it was when it was read; it is not read again behind the back of an editor. */
export function useDraft(modelId: string) {
  return useQuery({
    queryKey: keys.draft(modelId),
    queryFn: ({ signal }) => request(draftSchema, `${modelPath(modelId)}/draft`, { signal }),
    staleTime: Infinity,
    refetchOnWindowFocus: false,
  });
}

/** How a save ended: it stands, or another text has been saved meanwhile. */
export type SaveOutcome =
  | { readonly kind: 'saved'; readonly draft: Draft }
  | { readonly kind: 'conflict'; readonly current: Draft };

/** Saves the draft. Other faults than a conflict are thrown as ProblemError. */
export async function saveDraft(
  modelId: string,
  body: SaveDraft,
  signal?: AbortSignal,
): Promise<SaveOutcome> {
  try {
    const draft = await request(draftSchema, `${modelPath(modelId)}/draft`, {
      method: 'PUT',
      body,
      ...(signal ? { signal } : {}),
    });
    return { kind: 'saved', draft };
  } catch (fault) {
    if (!isProblem(fault, 'draft-conflict')) throw fault;
    return { kind: 'conflict', current: draftConflictSchema.parse(fault.problem).current };
  }
}

/** Saves the draft and keeps the cached copy in step. */
export function useSaveDraft(modelId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SaveDraft) => saveDraft(modelId, body),
    onSuccess: (outcome) => {
      if (outcome.kind === 'saved') client.setQueryData(keys.draft(modelId), outcome.draft);
    },
  });
}
