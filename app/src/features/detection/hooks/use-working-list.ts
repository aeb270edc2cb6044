import { useState } from 'react';

interface Listed {
  detectionId: string;
}

/**
 * The list one works through keeps its order while one does: what is decided stays in its place instead of vanishing under
 * one's hands, what is new comes at the end, and what one sees of each is fresh.
 *
 * @returns the items in working order
 */
export function mergeWorkingList<T extends Listed>(held: readonly T[], fresh: readonly T[]): T[] {
  const byId = new Map(fresh.map((item) => [item.detectionId, item]));
  const known = new Set(held.map((item) => item.detectionId));
  return [
    ...held.map((item) => byId.get(item.detectionId) ?? item),
    ...fresh.filter((item) => !known.has(item.detectionId)),
  ];
}

/**
 * @param key what the list is of: another filter, order or run begins anew
 * @param fresh as the service has it now; undefined while it is not known
 */
export function useWorkingList<T extends Listed>(key: string, fresh: readonly T[] | undefined) {
  const [state, setState] = useState<{ key: string; fresh: readonly T[] | undefined; items: T[] }>({
    key,
    fresh: undefined,
    items: [],
  });
  if (state.key !== key || state.fresh !== fresh) {
    const held = state.key === key ? state.items : [];
    const next = { key, fresh, items: fresh ? mergeWorkingList(held, fresh) : held };
    setState(next);
    return next.items;
  }
  return state.items;
}
