import { z } from 'zod';

/** An error answer, `application/problem+json` (RFC 9457). */
export const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string().optional(),
  instance: z.string().optional(),
  /** Correlation id, to quote to the administrator. */
  requestId: z.string().optional(),
  /** The present state of what could not be changed, in answers 412 and 409. */
  current: z.unknown().optional(),
  errors: z.array(z.object({ pointer: z.string(), detail: z.string() })).optional(),
});
export type Problem = z.output<typeof problem>;
