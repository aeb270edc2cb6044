import { useCallback } from 'react';
import { useSearchParams } from 'react-router-dom';

/** Filters that live in the address: bookmarkable, shareable, and undone by going back. */
export function useSearchFilters() {
  const [search, setSearch] = useSearchParams();
  /** Sets or (with '' or null) clears parameters; any change of filter returns to the first page. */
  const set = useCallback(
    (changes: Record<string, string | null>, options?: { keepPlace?: boolean; replace?: boolean }) =>
      setSearch(
        (old) => {
          const next = new URLSearchParams(old);
          if (!options?.keepPlace) ['cursor', 'from'].forEach((key) => next.delete(key));
          for (const [key, value] of Object.entries(changes)) {
            if (value) next.set(key, value);
            else next.delete(key);
          }
          return next;
        },
        { replace: options?.replace ?? false },
      ),
    [setSearch],
  );
  const list = (key: string) => search.get(key)?.split(',').filter(Boolean) ?? [];
  const toggle = (key: string, value: string) => {
    const held = list(key);
    set({ [key]: (held.includes(value) ? held.filter((v) => v !== value) : [...held, value]).join(',') });
  };
  return { search, set, list, toggle };
}
