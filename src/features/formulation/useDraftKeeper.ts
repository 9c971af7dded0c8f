/** The draft keeper in a browser: local storage, other tabs, leaving the page, coming online. */
import { useEffect, useMemo, useSyncExternalStore } from 'react';
import { z } from 'zod';
import { draftSchema, type Draft } from '../../../shared/contracts/models.ts';
import { commandWhileLeaving, describeFault, ProblemError, saveDraft } from '../../api/index.ts';
import { DraftKeeper, type DraftView, type LocalCopy } from './draftKeeper.ts';

const localCopySchema = z.object({ source: z.string(), basedOn: z.number() });

const keyOf = (modelId: string): string => `massieu draft ${modelId}`;

function readLocal(modelId: string): LocalCopy | undefined {
  try {
    const kept = localStorage.getItem(keyOf(modelId));
    return kept === null ? undefined : localCopySchema.parse(JSON.parse(kept));
  } catch {
    // Storage is closed to us, or holds what we have not written.
    return undefined;
  }
}

function writeLocal(modelId: string, copy: LocalCopy | undefined): void {
  try {
    if (copy) localStorage.setItem(keyOf(modelId), JSON.stringify(copy));
    else localStorage.removeItem(keyOf(modelId));
  } catch {
    // A full or closed storage must not stop the typing; the server gets the text all the same.
  }
}

/** The text of a model's draft and how it is kept; a new keeper for each model. */
export function useDraftKeeper(modelId: string, draft: Draft): [DraftView, DraftKeeper] {
  const channel = useMemo(() => new BroadcastChannel(keyOf(modelId)), [modelId]);
  const keeper = useMemo(
    () =>
      new DraftKeeper(draft, {
        save: (body) => saveDraft(modelId, body),
        refusal: (fault) =>
          fault instanceof ProblemError && fault.problem.status < 500
            ? describeFault(fault)
            : undefined,
        readLocal: () => readLocal(modelId),
        writeLocal: (copy) => writeLocal(modelId, copy),
        tellOthers: (saved) => channel.postMessage(saved),
      }),
    // The draft is where the keeper starts; later ones reach it by other ways.
    // eslint-disable-next-line react-hooks/exhaustive-deps
    [modelId, channel],
  );

  useEffect(() => {
    const hear = ({ data }: MessageEvent<unknown>): void => {
      const parsed = draftSchema.safeParse(data);
      if (parsed.success) keeper.hear(parsed.data);
    };
    const retry = (): void => keeper.retry();
    const leave = (): void => {
      const unsent = keeper.unsent();
      if (unsent) {
        commandWhileLeaving(`/api/models/${encodeURIComponent(modelId)}/draft`, 'PUT', unsent);
      }
    };
    const hide = (): void => {
      if (document.visibilityState === 'hidden') void keeper.flush();
    };
    channel.addEventListener('message', hear);
    window.addEventListener('online', retry);
    window.addEventListener('pagehide', leave);
    document.addEventListener('visibilitychange', hide);
    return () => {
      channel.removeEventListener('message', hear);
      window.removeEventListener('online', retry);
      window.removeEventListener('pagehide', leave);
      document.removeEventListener('visibilitychange', hide);
      // Going to another section saves what is not saved yet.
      void keeper.flush();
    };
  }, [channel, keeper, modelId]);

  return [useSyncExternalStore(keeper.subscribe, keeper.view), keeper];
}
