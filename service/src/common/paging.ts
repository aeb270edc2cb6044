import type { List } from '@eremite/shared/contracts/list';
import { AppError } from './app-error.ts';

/** A place in a list as an opaque text: the sort values of the last item handed out. */
export function encodeCursor(place: readonly (string | number | null)[]): string {
  return Buffer.from(JSON.stringify(place)).toString('base64url');
}

/** The place a cursor stands for; undefined without one. */
export function decodeCursor(cursor: string | undefined): (string | number | null)[] | undefined {
  if (cursor === undefined) return undefined;
  try {
    const place: unknown = JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
    const plain = (v: unknown) => v === null || typeof v === 'string' || typeof v === 'number';
    if (Array.isArray(place) && place.every(plain)) return place;
  } catch {
    // Falls through to the one message.
  }
  throw new AppError('VALIDATION_FAILED', 'The cursor is not one of this list; start again without it.', [
    { pointer: '/cursor', detail: 'not a cursor of this list' },
  ]);
}

/** The last row number the database can hold: no list goes further. */
const FURTHEST = 2_147_483_646;

/** A place in a list that can be a cursor's. */
export const isPlace = (value: unknown): value is number =>
  Number.isInteger(value) && (value as number) >= 0 && (value as number) <= FURTHEST;

/** Offset of a cursor made by {@link pageByOffset}; 0 without one. */
export function offsetOf(cursor: string | undefined): number {
  const place = decodeCursor(cursor);
  if (!place) return 0;
  const offset = place[0];
  if (isPlace(offset)) return offset;
  throw new AppError('VALIDATION_FAILED', 'The cursor is not one of this list; start again without it.');
}

/** A page of a list whose order cannot change between calls, or changes harmlessly. */
export function pageByOffset<T>(items: T[], total: number, offset: number): List<T> {
  const next = offset + items.length;
  return { items, total, nextCursor: items.length > 0 && next < total ? encodeCursor([next]) : null };
}

/** A page of a whole list held in memory. */
export function pageOf<T>(all: readonly T[], query: { limit: number; cursor?: string | undefined }): List<T> {
  const offset = offsetOf(query.cursor);
  return pageByOffset(all.slice(offset, offset + query.limit), all.length, offset);
}
