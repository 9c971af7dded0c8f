/** The theme: the system's by default, or what the reader chose; kept in the browser. */
import { useSyncExternalStore } from 'react';

export const THEME_CHOICES = ['system', 'light', 'dark'] as const;
export type ThemeChoice = (typeof THEME_CHOICES)[number];
export type Theme = 'light' | 'dark';

const KEY = 'massieu.theme';
const listeners = new Set<() => void>();

function storedChoice(): ThemeChoice {
  try {
    const stored = localStorage.getItem(KEY);
    return stored === 'light' || stored === 'dark' ? stored : 'system';
  } catch {
    return 'system';
  }
}

let choice: ThemeChoice = storedChoice();

function systemIsDark(): boolean {
  return matchMedia('(prefers-color-scheme: dark)').matches;
}

function currentTheme(): Theme {
  return choice === 'dark' || (choice === 'system' && systemIsDark()) ? 'dark' : 'light';
}

function show(): void {
  document.documentElement.dataset['theme'] = currentTheme();
  for (const listener of listeners) listener();
}

/** Takes up changes of the system and of other tabs; once, at the start. */
export function followTheme(): void {
  matchMedia('(prefers-color-scheme: dark)').addEventListener('change', show);
  window.addEventListener('storage', (event) => {
    if (event.key !== KEY) return;
    choice = storedChoice();
    show();
  });
  show();
}

/** Sets the theme and keeps the choice for later visits. */
export function chooseTheme(next: ThemeChoice): void {
  choice = next;
  try {
    if (next === 'system') localStorage.removeItem(KEY);
    else localStorage.setItem(KEY, next);
  } catch {
    // The choice then holds for this page only.
  }
  show();
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** The choice of the reader and the theme that results. */
export function useTheme(): { choice: ThemeChoice; theme: Theme } {
  const current = useSyncExternalStore(subscribe, () => choice);
  const theme = useSyncExternalStore(subscribe, currentTheme);
  return { choice: current, theme };
}
