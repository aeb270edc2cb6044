import { z } from 'zod';

/** Number of a row in its file, from 1; a table cannot have more. */
export const rowNumber = z.int().min(1).max(2_147_483_647);

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
