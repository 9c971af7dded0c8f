/** Groups of people. */
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import {
  createGroupSchema,
  groupSchema,
  notebookSummarySchema,
} from '../../shared/contracts/models.ts';
import type { createNotebookSchema } from '../../shared/contracts/models.ts';
import { keys } from './queryClient.ts';
import { request } from './request.ts';

export function useGroup(groupId: string) {
  return useQuery({
    queryKey: keys.group(groupId),
    queryFn: ({ signal }) =>
      request(groupSchema, `/api/groups/${encodeURIComponent(groupId)}`, { signal }),
  });
}

/** What is needed of a thing just made: where to find it. */
const madeSchema = z.looseObject({ id: z.string() });

export function useCreateGroup() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof createGroupSchema>) =>
      request(madeSchema, '/api/groups', { method: 'POST', body }),
    onSuccess: async () => {
      await Promise.all([
        client.invalidateQueries({ queryKey: keys.session }),
        client.invalidateQueries({ queryKey: keys.desk }),
      ]);
    },
  });
}

export function useCreateNotebook(groupId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof createNotebookSchema>) =>
      request(
        notebookSummarySchema.pick({ id: true }),
        `/api/groups/${encodeURIComponent(groupId)}/notebooks`,
        { method: 'POST', body },
      ),
    onSuccess: async () => {
      await Promise.all([
        client.invalidateQueries({ queryKey: keys.group(groupId) }),
        client.invalidateQueries({ queryKey: keys.desk }),
      ]);
    },
  });
}
