import { useSyncExternalStore } from 'react';
import { COMMAND_IDS, type KeyMap } from './keys/commands.ts';

/** What one person prefers in this browser. */
export interface Preferences {
  theme: 'dark' | 'light';
  /** Single-key commands of the docket. */
  shortcuts: boolean;
  /** Keys that were set otherwise. */
  keys: KeyMap;
}

const KEY = 'eremite.preferences';
const DEFAULTS: Preferences = { theme: 'dark', shortcuts: true, keys: {} };
const listeners = new Set<() => void>();

/** Only keys of commands that exist: what an older version kept must not break the page. */
function knownKeys(kept: unknown): KeyMap {
  const keys = (typeof kept === 'object' && kept !== null ? kept : {}) as Record<string, unknown>;
  return Object.fromEntries(
    COMMAND_IDS.flatMap((id) => (typeof keys[id] === 'string' ? [[id, keys[id] as string] as const] : [])),
  );
}

function read(): Preferences {
  try {
    const kept = JSON.parse(localStorage.getItem(KEY) ?? '{}') as Partial<Preferences>;
    return {
      theme: kept.theme === 'light' ? 'light' : DEFAULTS.theme,
      shortcuts: kept.shortcuts ?? DEFAULTS.shortcuts,
      keys: knownKeys(kept.keys),
    };
  } catch {
    return DEFAULTS;
  }
}

let current = read();

/** Puts the theme on the document, for our tokens and for Blueprint's. */
export function applyTheme(theme: Preferences['theme'] = current.theme): void {
  document.documentElement.dataset['theme'] = theme;
  document.body.classList.toggle('bp6-dark', theme === 'dark');
}

export function setPreferences(change: Partial<Preferences>): void {
  current = { ...current, ...change };
  try {
    localStorage.setItem(KEY, JSON.stringify(current));
  } catch {
    // A browser that keeps nothing still honours the choice until the page is left.
  }
  applyTheme();
  listeners.forEach((listener) => listener());
}

export function usePreferences(): Preferences {
  return useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => current,
  );
}

/** Paper is light whatever the screen is. */
export function printOnPaper(): void {
  window.addEventListener('beforeprint', () => applyTheme('light'));
  window.addEventListener('afterprint', () => applyTheme());
}
