/** Messages: a line under the running head, one at a time, with undo where that is possible. */
import { useSyncExternalStore } from 'react';

export interface Message {
  readonly id: number;
  readonly text: string;
  readonly undo?: () => void;
}

const STAYS_MS = 8000;

let current: Message | undefined;
let serial = 0;
let timer: ReturnType<typeof setTimeout> | undefined;
const listeners = new Set<() => void>();

function show(message: Message | undefined): void {
  clearTimeout(timer);
  current = message;
  for (const listener of listeners) listener();
}

/** Shows a message; the one before it gives way. */
export function say(text: string, undo?: () => void): void {
  serial += 1;
  show({ id: serial, text, ...(undo ? { undo } : {}) });
  const { id } = { id: serial };
  timer = setTimeout(() => {
    if (current?.id === id) show(undefined);
  }, STAYS_MS);
}

export function dismiss(): void {
  show(undefined);
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function useMessages() {
  const message = useSyncExternalStore(subscribe, () => current);
  return { message, say, dismiss };
}
