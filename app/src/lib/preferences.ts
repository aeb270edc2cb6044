import { useSyncExternalStore } from 'react';

/** What one person prefers in this browser. */
export interface Preferences {
  theme: 'dark' | 'light';
  /** Single-key commands of the docket. */
  shortcuts: boolean;
}

const KEY = 'eremite.preferences';
const DEFAULTS: Preferences = { theme: 'dark', shortcuts: true };
const listeners = new Set<() => void>();

function read(): Preferences {
  try {
    const kept = JSON.parse(localStorage.getItem(KEY) ?? '{}') as Partial<Preferences>;
    return {
      theme: kept.theme === 'light' ? 'light' : DEFAULTS.theme,
      shortcuts: kept.shortcuts ?? DEFAULTS.shortcuts,
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
