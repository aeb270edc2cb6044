import { describe, expect, it } from 'vitest';
import { decodeCursor, encodeCursor, pageOf } from './paging.ts';

describe('paging', () => {
  it('gives a cursor back as the place it was made of', () => {
    const place = [1.5, 'a "text"', null];
    expect(decodeCursor(encodeCursor(place))).toEqual(place);
    expect(decodeCursor(undefined)).toBeUndefined();
  });

  it.each(['nonsense', '', encodeCursor([]).slice(1), Buffer.from('{"a":1}').toString('base64url')])(
    'refuses "%s" as a cursor',
    (cursor) => {
      expect(() => decodeCursor(cursor)).toThrow('cursor');
    },
  );

  it('walks through a list without losing or repeating an item, and ends', () => {
    const all = Array.from({ length: 7 }, (_, i) => i);
    const seen: number[] = [];
    let cursor: string | undefined;
    do {
      const page = pageOf(all, { limit: 3, cursor });
      expect(page.total).toBe(7);
      seen.push(...page.items);
      cursor = page.nextCursor ?? undefined;
    } while (cursor);
    expect(seen).toEqual(all);
  });
});
