import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { Draft, SaveDraft } from '../../../shared/contracts/models.ts';
import type { SaveOutcome } from '../../../src/api/index.ts';
import {
  DraftKeeper,
  type DraftSurroundings,
  type LocalCopy,
} from '../../../src/features/formulation/draftKeeper.ts';

const AT = '2026-05-14T09:00:00.000Z';

function draft(source: string, revision: number, name = 'I. Varnholt'): Draft {
  return { source, revision, updatedAt: AT, updatedBy: { id: name, name } };
}

/** A server with one draft, a browser's storage, and other tabs that listen. */
class World implements DraftSurroundings {
  current: Draft;
  local: LocalCopy | undefined;
  isOffline = false;
  refuses: string | undefined;
  readonly saves: SaveDraft[] = [];
  readonly tabs: DraftKeeper[] = [];

  constructor(current: Draft) {
    this.current = current;
  }

  save = (body: SaveDraft): Promise<SaveOutcome> => {
    if (this.isOffline || this.refuses !== undefined) return Promise.reject(new Error('no'));
    this.saves.push(body);
    if (body.basedOn !== this.current.revision) {
      return Promise.resolve({ kind: 'conflict', current: this.current });
    }
    this.current = draft(body.source, body.basedOn + 1);
    return Promise.resolve({ kind: 'saved', draft: this.current });
  };
  refusal = (): string | undefined => this.refuses;
  readLocal = (): LocalCopy | undefined => this.local;
  writeLocal = (copy: LocalCopy | undefined): void => {
    this.local = copy;
  };
  tellOthers = (saved: Draft): void => {
    for (const tab of this.tabs) tab.hear(saved);
  };
}

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

async function pass(milliseconds: number): Promise<void> {
  await vi.advanceTimersByTimeAsync(milliseconds);
}

describe('a draft', () => {
  it('is kept in the browser at once and on the server a moment later', async () => {
    const world = new World(draft('a', 3));
    const keeper = new DraftKeeper(world.current, world);
    keeper.edit('ab');
    expect(world.local).toEqual({ source: 'ab', basedOn: 3 });
    expect(world.saves).toEqual([]);
    await pass(2000);
    expect(world.saves).toEqual([{ source: 'ab', basedOn: 3 }]);
    expect(keeper.view()).toMatchObject({ text: 'ab', revision: 4, status: { kind: 'saved' } });
    expect(world.local).toBeUndefined();
  });

  it('is saved once for many keystrokes', async () => {
    const world = new World(draft('', 0));
    const keeper = new DraftKeeper(world.current, world);
    for (const text of ['e', 'en', 'ens']) keeper.edit(text);
    await pass(5000);
    expect(world.saves).toEqual([{ source: 'ens', basedOn: 0 }]);
  });

  it('goes on after a reload where it was', async () => {
    const world = new World(draft('old', 5));
    world.local = { source: 'old and new', basedOn: 5 };
    const keeper = new DraftKeeper(world.current, world);
    expect(keeper.view().text).toBe('old and new');
    await pass(2000);
    expect(world.current.source).toBe('old and new');
  });

  it('that was left unsaved on an older revision meets the other text, and neither is lost', () => {
    const world = new World(draft('theirs', 6, 'T. Oswin'));
    world.local = { source: 'mine', basedOn: 5 };
    const keeper = new DraftKeeper(world.current, world);
    expect(keeper.view()).toMatchObject({
      text: 'mine',
      status: { kind: 'conflict', theirs: { source: 'theirs' } },
    });
  });

  it('is never overwritten in silence: the second to save is shown both', async () => {
    const world = new World(draft('a', 1));
    const keeper = new DraftKeeper(world.current, world);
    world.current = draft('theirs', 2, 'T. Oswin');
    keeper.edit('mine');
    await pass(2000);
    expect(keeper.view()).toMatchObject({
      text: 'mine',
      status: { kind: 'conflict', theirs: { source: 'theirs', updatedBy: { name: 'T. Oswin' } } },
    });
    expect(world.current.source).toBe('theirs');
    // Typing on does not save until a person has chosen.
    keeper.edit('mine, longer');
    await pass(20_000);
    expect(world.current.source).toBe('theirs');
    expect(world.local?.source).toBe('mine, longer');
    keeper.settle('both');
    await pass(2000);
    expect(world.current).toMatchObject({ source: 'both', revision: 3 });
    expect(keeper.view().status.kind).toBe('saved');
  });

  it('takes the other text where that is chosen', async () => {
    const world = new World(draft('a', 1));
    const keeper = new DraftKeeper(world.current, world);
    world.current = draft('theirs', 2);
    keeper.edit('mine');
    await pass(2000);
    keeper.settle('theirs');
    expect(keeper.view()).toMatchObject({ text: 'theirs', revision: 2, status: { kind: 'saved' } });
    expect(world.local).toBeUndefined();
  });

  it('waits for the connection and is saved when it returns', async () => {
    const world = new World(draft('a', 1));
    const keeper = new DraftKeeper(world.current, world);
    world.isOffline = true;
    keeper.edit('written offline');
    await pass(2000);
    expect(keeper.view().status.kind).toBe('offline');
    expect(world.local?.source).toBe('written offline');
    world.isOffline = false;
    keeper.retry();
    await pass(100);
    expect(world.current.source).toBe('written offline');
  });

  it('tries again by itself while the connection is away', async () => {
    const world = new World(draft('a', 1));
    const keeper = new DraftKeeper(world.current, world);
    world.isOffline = true;
    keeper.edit('b');
    await pass(3000);
    world.isOffline = false;
    await pass(10_000);
    expect(keeper.view().status.kind).toBe('saved');
  });

  it('says why the server refuses it, and keeps it', async () => {
    const world = new World(draft('a', 1));
    const keeper = new DraftKeeper(world.current, world);
    world.refuses = 'As a reader you may not save a draft.';
    keeper.edit('b');
    await pass(2000);
    expect(keeper.view().status).toEqual({ kind: 'refused', why: world.refuses });
    expect(world.local?.source).toBe('b');
  });

  it('follows another tab while it is untouched, and meets it where it is not', async () => {
    const world = new World(draft('a', 1));
    const first = new DraftKeeper(world.current, world);
    const second = new DraftKeeper(world.current, { ...world, tellOthers: () => undefined });
    world.tabs.push(second);
    first.edit('a1');
    await pass(2000);
    expect(second.view()).toMatchObject({ text: 'a1', revision: 2, status: { kind: 'saved' } });
    second.edit('a1 second');
    first.edit('a1 first');
    await first.flush();
    expect(second.view()).toMatchObject({
      text: 'a1 second',
      status: { kind: 'conflict', theirs: { source: 'a1 first' } },
    });
  });

  it('whose save was answered to nobody is saved, and meets no other text', async () => {
    const world = new World(draft('a', 1));
    const keeper = new DraftKeeper(world.current, world);
    // The page was left while it was saved; the server has it.
    world.current = draft('ab', 2);
    keeper.edit('ab');
    await pass(2000);
    expect(keeper.view()).toMatchObject({ text: 'ab', revision: 2, status: { kind: 'saved' } });
    expect(world.local).toBeUndefined();
  });

  it('leaves nothing in the browser that the server has', () => {
    const world = new World(draft('a', 6));
    world.local = { source: 'a', basedOn: 5 };
    const keeper = new DraftKeeper(world.current, world);
    expect(keeper.isSettled()).toBe(true);
    expect(world.local).toBeUndefined();
  });

  it('that was refused is tried again when the person comes back', async () => {
    const world = new World(draft('a', 1));
    const keeper = new DraftKeeper(world.current, world);
    world.refuses = 'Sign in first.';
    keeper.edit('b');
    await pass(2000);
    expect(keeper.isSettled()).toBe(false);
    world.refuses = undefined;
    keeper.retry();
    await pass(100);
    expect(keeper.view().status.kind).toBe('saved');
  });

  it('is flushed before it is frozen', async () => {
    const world = new World(draft('a', 1));
    const keeper = new DraftKeeper(world.current, world);
    keeper.edit('to be frozen');
    const view = await keeper.flush();
    expect(view).toMatchObject({ revision: 2, status: { kind: 'saved' } });
    expect(world.current.source).toBe('to be frozen');
  });

  it('tells what must be sent while the page is left', () => {
    const world = new World(draft('a', 1));
    const keeper = new DraftKeeper(world.current, world);
    expect(keeper.unsent()).toBeUndefined();
    keeper.edit('b');
    expect(keeper.unsent()).toEqual({ source: 'b', basedOn: 1 });
  });
});
