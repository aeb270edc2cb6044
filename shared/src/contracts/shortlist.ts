import { z } from 'zod';
import { verdictItem } from './verdict.ts';

export const shortlistEntry = z.object({
  detectionId: z.uuid(),
  rank: z.int(),
  reason: z.string(),
  /** What it would prove if follow-up finds nothing. */
  nullResult: z.string(),
  verdict: verdictItem.nullable(),
});
export const shortlist = z.object({
  runId: z.uuid().nullable(),
  runNumber: z.int().nullable(),
  version: z.int(),
  entries: z.array(shortlistEntry),
});
export type Shortlist = z.output<typeof shortlist>;

export const putShortlistRequest = z.strictObject({
  runId: z.uuid(),
  entries: z
    .array(
      z.strictObject({
        detectionId: z.uuid(),
        reason: z.string().trim().max(2000).default(''),
        nullResult: z.string().trim().max(2000).default(''),
      }),
    )
    .max(10_000),
});
export type PutShortlistRequest = z.output<typeof putShortlistRequest>;
