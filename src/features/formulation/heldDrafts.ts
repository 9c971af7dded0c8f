/**
 * The drafts at hand, by model. One whose text the server does not have yet lives on when its
 * section is left, goes on trying, and is taken up again where it was.
 */
import { z } from 'zod';
import { draftSchema, type Draft } from '../../../shared/contracts/models.ts';
import {
  commandWhileLeaving,
  describeFault,
  modelPath,
  ProblemError,
  saveDraft,
} from '../../api/index.ts';
import { DraftKeeper, type LocalCopy } from './draftKeeper.ts';

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

interface Held {
  readonly keeper: DraftKeeper;
  readonly close: () => void;
  users: number;
}

const held = new Map<string, Held>();

/** What is told whenever the server's draft of a model changes. */
type OnSaved = (modelId: string, draft: Draft) => void;

/** The keeper of a model's draft, begun with what the server has where there is none yet. */
export function holdDraft(modelId: string, draft: Draft, onSaved: OnSaved): DraftKeeper {
  const known = held.get(modelId);
  if (known) return known.keeper;
  const opened = open(modelId, draft, onSaved);
  held.set(modelId, opened);
  return opened.keeper;
}

/** Counts one more section that shows the draft; the answer counts it off again. */
export function countUse(modelId: string): () => void {
  const one = held.get(modelId);
  if (!one) return () => undefined;
  one.users += 1;
  return () => {
    one.users -= 1;
    void letGo(modelId, one);
  };
}

async function letGo(modelId: string, one: Held): Promise<void> {
  await one.keeper.flush();
  if (one.users > 0 || held.get(modelId) !== one || !one.keeper.isSettled()) return;
  held.delete(modelId);
  one.close();
}

function open(modelId: string, draft: Draft, onSaved: OnSaved): Held {
  const channel = new BroadcastChannel(keyOf(modelId));
  const keeper = new DraftKeeper(draft, {
    save: (body) => saveDraft(modelId, body),
    refusal: (fault) =>
      fault instanceof ProblemError && fault.status > 0 && fault.status < 500
        ? describeFault(fault)
        : undefined,
    readLocal: () => readLocal(modelId),
    writeLocal: (copy) => writeLocal(modelId, copy),
    tellOthers: (saved) => {
      channel.postMessage(saved);
      onSaved(modelId, saved);
    },
  });
  const hear = ({ data }: MessageEvent<unknown>): void => {
    const parsed = draftSchema.safeParse(data);
    if (!parsed.success) return;
    keeper.hear(parsed.data);
    onSaved(modelId, parsed.data);
  };
  const retry = (): void => keeper.retry();
  const leave = (): void => {
    const unsent = keeper.unsent();
    if (unsent) commandWhileLeaving(`${modelPath(modelId)}/draft`, 'PUT', unsent);
  };
  const turn = (): void => {
    if (document.visibilityState === 'hidden') void keeper.flush();
    else keeper.retry();
  };
  channel.addEventListener('message', hear);
  window.addEventListener('online', retry);
  window.addEventListener('pagehide', leave);
  document.addEventListener('visibilitychange', turn);
  return {
    keeper,
    users: 0,
    close: () => {
      channel.close();
      window.removeEventListener('online', retry);
      window.removeEventListener('pagehide', leave);
      document.removeEventListener('visibilitychange', turn);
      keeper.close();
    },
  };
}
