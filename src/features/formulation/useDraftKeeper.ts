/** The text of a model's draft in a component, and how it is kept. */
import { useEffect, useMemo, useSyncExternalStore } from 'react';
import { useQueryClient } from '@tanstack/react-query';
import type { Draft } from '../../../shared/contracts/models.ts';
import { keys } from '../../api/index.ts';
import type { DraftKeeper, DraftView } from './draftKeeper.ts';
import { holdDraft, countUse } from './heldDrafts.ts';

/**
 * The text of a draft and its keeper. `draft` is what the server was last heard to have: where
 * somebody else has saved meanwhile, an untouched text follows and any other meets it.
 */
export function useDraftKeeper(modelId: string, draft: Draft): [DraftView, DraftKeeper] {
  const client = useQueryClient();
  const keeper = useMemo(
    () =>
      holdDraft(modelId, draft, (id, saved) => {
        // An answer under way may be older than what has just been saved.
        void client.cancelQueries({ queryKey: keys.draft(id) });
        client.setQueryData(keys.draft(id), saved);
      }),
    // The draft is where the keeper starts; later ones reach it below.
    // eslint-disable-next-line react-hooks/exhaustive-deps
    [modelId, client],
  );
  useEffect(() => countUse(modelId), [modelId, keeper]);
  useEffect(() => keeper.hear(draft), [keeper, draft]);
  return [useSyncExternalStore(keeper.subscribe, keeper.view), keeper];
}
