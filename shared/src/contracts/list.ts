import { z } from 'zod';

/** Paging of every list: `limit` rows after `cursor`, ordered by `sort` (a leading `-` turns it round). */
export const listQuery = z.object({
  limit: z.coerce.number().int().min(1).max(1000).default(100),
  cursor: z.string().max(500).optional(),
  sort: z.string().max(60).optional(),
});
export type ListQuery = z.output<typeof listQuery>;

export const listOf = <T extends z.ZodType>(item: T) =>
  z.object({ items: z.array(item), nextCursor: z.string().nullable(), total: z.int().nonnegative() });

export interface List<T> {
  items: T[];
  nextCursor: string | null;
  total: number;
}
