/**
 * Keeps one worker busy with the newest source only: while it derives, later sources wait, and of
 * those the last alone is kept. A derivation that goes on too long is ended with its worker.
 */
import type { DerivationRequest, DerivationResponse } from './derivationProtocol.ts';

/** After this long a derivation is given up, so that a heavy model does not stop the editor. */
export const LONGEST_MS = 20_000;
/** With a newer source waiting, one is given up sooner. */
export const LONGEST_WITH_NEWER_MS = 2000;

/** A worker that holds more expressions gives way to a fresh one; about 100 MB. */
export const MOST_EXPRESSIONS = 300_000;

/** What the deriver needs of a Worker. */
export interface DerivationWorker {
  onmessage: ((event: MessageEvent<DerivationResponse>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
  postMessage(request: DerivationRequest): void;
  terminate(): void;
}

export interface Listener {
  readonly onResponse: (response: DerivationResponse, source: string) => void;
  /** The worker took too long or broke; `why` is a sentence for the reader. */
  readonly onFailure: (why: string, source: string) => void;
}

interface Running {
  readonly id: number;
  readonly source: string;
  readonly startedAt: number;
}

export class LiveDeriver {
  #worker: DerivationWorker | undefined;
  #running: Running | undefined;
  #waiting: string | undefined;
  #timer: ReturnType<typeof setTimeout> | undefined;
  #serial = 0;
  readonly #create: () => DerivationWorker;
  readonly #listener: Listener;
  readonly #brief: readonly string[] | undefined;

  /** With `brief` only these properties are derived, and only their formulas. */
  constructor(create: () => DerivationWorker, listener: Listener, brief?: readonly string[]) {
    this.#create = create;
    this.#listener = listener;
    this.#brief = brief;
  }

  /** Derives the source as soon as the worker is free. */
  derive(source: string): void {
    if (!this.#running) {
      this.#start(source);
      return;
    }
    this.#waiting = source;
    this.#watch();
  }

  /** Ends the worker; nothing is reported any more. */
  close(): void {
    clearTimeout(this.#timer);
    this.#worker?.terminate();
    this.#worker = undefined;
    this.#running = undefined;
    this.#waiting = undefined;
  }

  #start(source: string): void {
    this.#worker ??= this.#open();
    this.#serial += 1;
    this.#running = { id: this.#serial, source, startedAt: performance.now() };
    this.#worker.postMessage({
      id: this.#serial,
      source,
      ...(this.#brief ? { brief: this.#brief } : {}),
    });
    this.#watch();
  }

  #open(): DerivationWorker {
    const worker = this.#create();
    worker.onmessage = ({ data }) => this.#finish(data);
    worker.onerror = () => this.#giveUp('The derivation broke off by a mistake of ours.');
    return worker;
  }

  #watch(): void {
    clearTimeout(this.#timer);
    if (!this.#running) return;
    const limit = this.#waiting === undefined ? LONGEST_MS : LONGEST_WITH_NEWER_MS;
    const left = this.#running.startedAt + limit - performance.now();
    this.#timer = setTimeout(
      () => this.#giveUp(`The derivation was given up after ${limit / 1000} s.`),
      Math.max(0, left),
    );
  }

  #finish(response: DerivationResponse): void {
    const running = this.#running;
    if (running?.id !== response.id) return;
    if (response.expressions > MOST_EXPRESSIONS) {
      this.#worker?.terminate();
      // Opened at once, so that the next keystroke does not wait for it.
      this.#worker = this.#open();
    }
    this.#next();
    this.#listener.onResponse(response, running.source);
  }

  #giveUp(why: string): void {
    const running = this.#running;
    this.#worker?.terminate();
    this.#worker = undefined;
    const isSuperseded = this.#waiting !== undefined;
    this.#next();
    if (running && !isSuperseded) this.#listener.onFailure(why, running.source);
  }

  #next(): void {
    clearTimeout(this.#timer);
    this.#running = undefined;
    const source = this.#waiting;
    this.#waiting = undefined;
    if (source !== undefined) this.#start(source);
  }
}
