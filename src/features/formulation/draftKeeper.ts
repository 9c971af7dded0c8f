/**
 * Keeps the text of a draft: in this browser with every keystroke, on the server a moment later,
 * and in step with other tabs. It never overwrites another text in silence: where one was saved
 * meanwhile, both are held until a person chooses.
 */
import type { Draft, SaveDraft } from '../../../shared/contracts/models.ts';
import type { SaveOutcome } from '../../api/index.ts';

export type DraftStatus =
  | { readonly kind: 'saved'; readonly at: string }
  | { readonly kind: 'unsaved' }
  | { readonly kind: 'saving' }
  /** Kept in this browser; will be tried again. */
  | { readonly kind: 'offline' }
  /** The server refuses the text, in words. */
  | { readonly kind: 'refused'; readonly why: string }
  | { readonly kind: 'conflict'; readonly theirs: Draft };

export interface DraftView {
  readonly text: string;
  readonly status: DraftStatus;
  /** The revision that the server has and that the text builds on. */
  readonly revision: number;
}

/** What the browser keeps of a text that the server may not have. */
export interface LocalCopy {
  readonly source: string;
  readonly basedOn: number;
}

export interface DraftSurroundings {
  save(body: SaveDraft): Promise<SaveOutcome>;
  /** Why a save failed for good, in words; undefined where the connection is at fault. */
  refusal(fault: unknown): string | undefined;
  readLocal(): LocalCopy | undefined;
  writeLocal(copy: LocalCopy | undefined): void;
  /** Tells the other tabs what has been saved. */
  tellOthers(draft: Draft): void;
}

const SAVE_AFTER_MS = 900;
const TRY_AGAIN_MS = 4_000;

export class DraftKeeper {
  #draft: Draft;
  #text: string;
  #status: DraftStatus;
  #view: DraftView;
  #timer: ReturnType<typeof setTimeout> | undefined;
  #isClosed = false;
  readonly #surroundings: DraftSurroundings;
  readonly #listeners = new Set<() => void>();

  constructor(draft: Draft, surroundings: DraftSurroundings) {
    this.#surroundings = surroundings;
    this.#draft = draft;
    this.#text = draft.source;
    this.#status = { kind: 'saved', at: draft.updatedAt };
    const local = surroundings.readLocal();
    if (local && local.source !== draft.source) {
      this.#text = local.source;
      // A text from before a reload goes on where it was; on an older revision it meets another one.
      if (local.basedOn === draft.revision) {
        this.#status = { kind: 'unsaved' };
        this.#schedule(SAVE_AFTER_MS);
      } else {
        this.#status = { kind: 'conflict', theirs: draft };
      }
    } else if (local) {
      surroundings.writeLocal(undefined);
    }
    this.#view = this.#look();
  }

  readonly subscribe = (listener: () => void): (() => void) => {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  };

  readonly view = (): DraftView => this.#view;

  /** Takes what was typed. */
  edit(text: string): void {
    if (text === this.#text) return;
    this.#text = text;
    this.#keepLocally();
    if (this.#status.kind !== 'conflict' && this.#status.kind !== 'saving') {
      this.#status = { kind: 'unsaved' };
      this.#schedule(SAVE_AFTER_MS);
    }
    this.#tell();
  }

  /** Saves now what is not saved yet; settles when nothing is left to save, or it cannot be saved. */
  async flush(): Promise<DraftView> {
    clearTimeout(this.#timer);
    while (this.#isDirty() && this.#status.kind !== 'conflict') {
      const before = this.#status.kind;
      if (before === 'saving') {
        await new Promise<void>((resolve) => {
          const leave = this.subscribe(() => {
            leave();
            resolve();
          });
        });
        continue;
      }
      await this.#save();
      if (this.#status.kind === 'offline' || this.#status.kind === 'refused') break;
    }
    return this.#view;
  }

  /** Ends a conflict with the text that a person chose or put together. */
  settle(text: string): void {
    if (this.#status.kind !== 'conflict') return;
    this.#draft = this.#status.theirs;
    this.#text = text;
    if (this.#isDirty()) {
      this.#status = { kind: 'unsaved' };
      this.#keepLocally();
      this.#schedule(0);
    } else {
      this.#status = { kind: 'saved', at: this.#draft.updatedAt };
      this.#surroundings.writeLocal(undefined);
    }
    this.#tell();
  }

  /** Somebody else has saved, in another tab say: a text without changes of its own follows. */
  hear(draft: Draft): void {
    if (draft.revision <= this.#draft.revision || this.#status.kind === 'saving') return;
    const isUntouched = !this.#isDirty();
    if (isUntouched || draft.source === this.#text) {
      this.#draft = draft;
      this.#text = draft.source;
      this.#status = { kind: 'saved', at: draft.updatedAt };
      this.#surroundings.writeLocal(undefined);
      clearTimeout(this.#timer);
    } else {
      this.#status = { kind: 'conflict', theirs: draft };
      clearTimeout(this.#timer);
    }
    this.#tell();
  }

  /** The connection is back, perhaps, or the person has signed in again. */
  retry(): void {
    if (this.#status.kind === 'offline' || this.#status.kind === 'refused') this.#schedule(0);
  }

  /** What must be sent while the page is being left; undefined where nothing must. */
  unsent(): SaveDraft | undefined {
    if (!this.#isDirty() || this.#status.kind === 'conflict') return undefined;
    return { source: this.#text, basedOn: this.#draft.revision };
  }

  /** Whether everything typed is on the server. */
  isSettled(): boolean {
    return this.#status.kind === 'saved' && !this.#isDirty();
  }

  close(): void {
    this.#isClosed = true;
    clearTimeout(this.#timer);
    this.#listeners.clear();
  }

  #isDirty(): boolean {
    return this.#text !== this.#draft.source;
  }

  #keepLocally(): void {
    this.#surroundings.writeLocal(
      this.#isDirty() ? { source: this.#text, basedOn: this.#draft.revision } : undefined,
    );
  }

  #schedule(milliseconds: number): void {
    clearTimeout(this.#timer);
    if (this.#isClosed) return;
    this.#timer = setTimeout(() => void this.#save(), milliseconds);
  }

  async #save(): Promise<void> {
    if (!this.#isDirty()) {
      if (this.#status.kind !== 'saving' && this.#status.kind !== 'conflict') {
        this.#status = { kind: 'saved', at: this.#draft.updatedAt };
        this.#tell();
      }
      return;
    }
    if (this.#status.kind === 'saving' || this.#status.kind === 'conflict') return;
    this.#status = { kind: 'saving' };
    this.#tell();
    const body = { source: this.#text, basedOn: this.#draft.revision };
    try {
      const outcome = await this.#surroundings.save(body);
      const draft = outcome.kind === 'saved' ? outcome.draft : outcome.current;
      // A save whose answer was lost, by leaving the page say, comes back as a conflict with itself.
      if (outcome.kind === 'conflict' && draft.source !== body.source) {
        this.#status = { kind: 'conflict', theirs: draft };
      } else {
        this.#draft = draft;
        this.#surroundings.tellOthers(draft);
        this.#status = this.#isDirty()
          ? { kind: 'unsaved' }
          : { kind: 'saved', at: draft.updatedAt };
        this.#keepLocally();
        if (this.#isDirty()) this.#schedule(SAVE_AFTER_MS);
      }
    } catch (fault) {
      const why = this.#surroundings.refusal(fault);
      this.#status = why === undefined ? { kind: 'offline' } : { kind: 'refused', why };
      if (why === undefined) this.#schedule(TRY_AGAIN_MS);
    }
    this.#tell();
  }

  #look(): DraftView {
    return { text: this.#text, status: this.#status, revision: this.#draft.revision };
  }

  #tell(): void {
    this.#view = this.#look();
    for (const listener of [...this.#listeners]) listener();
  }
}
