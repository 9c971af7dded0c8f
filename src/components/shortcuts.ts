/** Keys of the application: a part registers what it does; `?` lists what holds at the moment. */
import { useEffect, useEffectEvent } from 'react';

export interface Shortcut {
  /** `/`, `?`, `Mod+Enter`: Mod is Ctrl, or ⌘ on a Mac. */
  readonly keys: string;
  /** What happens, for the list: `find a model`. */
  readonly does: string;
}

interface Registered extends Shortcut {
  readonly run: (event: KeyboardEvent) => void;
}

const registered = new Set<Registered>();

const isMac = typeof navigator !== 'undefined' && navigator.userAgent.includes('Mac');

/** The keys as they stand on the keyboard at hand. */
export function spellKeys(keys: string): string {
  return keys.replace('Mod', isMac ? '⌘' : 'Ctrl');
}

function isTyping(event: KeyboardEvent): boolean {
  const target = event.target;
  return (
    target instanceof HTMLElement &&
    (target.isContentEditable ||
      /^(INPUT|TEXTAREA|SELECT)$/.test(target.tagName) ||
      // The editor takes its keys by an element of its own, which is none of these.
      target.closest('[role="textbox"], .monaco-editor') !== null)
  );
}

function matches(event: KeyboardEvent, keys: string): boolean {
  const parts = keys.split('+');
  const key = parts.at(-1);
  const wantsMod = parts.includes('Mod');
  if (wantsMod !== (isMac ? event.metaKey : event.ctrlKey) || event.altKey) return false;
  return event.key.toLowerCase() === key?.toLowerCase();
}

function onKeyDown(event: KeyboardEvent): void {
  if (event.defaultPrevented || event.isComposing) return;
  // The latest to register goes first, so that a room may take a key over.
  for (const shortcut of [...registered].reverse()) {
    if (!matches(event, shortcut.keys)) continue;
    if (
      !shortcut.keys.includes('Mod') &&
      (isTyping(event) || document.querySelector('dialog[open]'))
    )
      continue;
    event.preventDefault();
    shortcut.run(event);
    return;
  }
}

/** Registers a key for as long as the component is shown. */
export function useShortcut(keys: string, does: string, run: (event: KeyboardEvent) => void): void {
  const onRun = useEffectEvent(run);
  useEffect(() => {
    const entry: Registered = { keys, does, run: (event) => onRun(event) };
    if (registered.size === 0) document.addEventListener('keydown', onKeyDown);
    registered.add(entry);
    return () => {
      registered.delete(entry);
      if (registered.size === 0) document.removeEventListener('keydown', onKeyDown);
    };
  }, [keys, does]);
}

/** What the keys do now, each key once. */
export function listShortcuts(): readonly Shortcut[] {
  const byKeys = new Map<string, Shortcut>();
  for (const { keys, does } of registered) byKeys.set(keys, { keys, does });
  return [...byKeys.values()];
}
