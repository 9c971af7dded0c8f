/** Notebooks: the models of one question. */
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import type { createModelSchema, updateNotebookSchema } from '../../shared/contracts/models.ts';
import { notebookSchema } from '../../shared/contracts/models.ts';
import { keys } from './queryClient.ts';
import { command, request } from './request.ts';

const pathOf = (notebookId: string) => `/api/notebooks/${encodeURIComponent(notebookId)}`;

export function useNotebook(notebookId: string) {
  return useQuery({
    queryKey: keys.notebook(notebookId),
    queryFn: ({ signal }) => request(notebookSchema, pathOf(notebookId), { signal }),
  });
}

export function useUpdateNotebook(notebookId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof updateNotebookSchema>) =>
      command(pathOf(notebookId), { method: 'PATCH', body }),
    onSuccess: () => client.invalidateQueries({ queryKey: keys.notebook(notebookId) }),
  });
}

export function useCreateModel(notebookId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof createModelSchema>) =>
      request(z.looseObject({ id: z.string() }), `${pathOf(notebookId)}/models`, {
        method: 'POST',
        body,
      }),
    onSuccess: async () => {
      await Promise.all([
        client.invalidateQueries({ queryKey: keys.notebook(notebookId) }),
        client.invalidateQueries({ queryKey: keys.desk }),
      ]);
    },
  });
}
