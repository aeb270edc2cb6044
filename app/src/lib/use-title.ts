import { useEffect } from 'react';

/** Names the page in the browser's tab and history. */
export function useTitle(...parts: (string | undefined)[]): void {
  const title = [...parts.filter(Boolean), 'Eremite'].join(' · ');
  useEffect(() => {
    document.title = title;
  }, [title]);
}
