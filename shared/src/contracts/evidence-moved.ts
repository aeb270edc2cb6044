import { z } from 'zod';

/** One piece of evidence that is not what it was when a word was given: what, and by how much. */
export const moved = z.object({
  what: z.string(),
  from: z.string(),
  to: z.string(),
  /** Difference of numbers in their unit, null for words. */
  by: z.number().nullable(),
  unit: z.string(),
});
export type Moved = z.output<typeof moved>;
