import { useCallback, useState } from 'react';

const PREFIX = 'eremite.draft.';

function kept(key: string): string {
  try {
    return localStorage.getItem(PREFIX + key) ?? '';
  } catch {
    return '';
  }
}

/** Forgets a draft: it was sent, or thrown away on purpose. */
export function dropDraft(key: string): void {
  try {
    localStorage.removeItem(PREFIX + key);
  } catch {
    // A browser that keeps nothing has nothing to forget.
  }
}

/**
 * Text that is being typed, kept in this browser until it is sent: closing a dialog, leaving the page or losing the network
 * loses none of it.
 *
 * @param key what the text is for, such as the detection and the question
 */
export function useDraft(key: string): [text: string, setText: (text: string) => void] {
  const [held, setHeld] = useState({ key, text: kept(key) });
  // Another question: its own draft, not the one before.
  const text = held.key === key ? held.text : kept(key);
  const set = useCallback(
    (next: string) => {
      setHeld({ key, text: next });
      try {
        if (next === '') localStorage.removeItem(PREFIX + key);
        else localStorage.setItem(PREFIX + key, next);
      } catch {
        // It stays in the field as long as the page is open.
      }
    },
    [key],
  );
  return [text, set];
}
