import { z } from 'zod';
import { observabilityQuery } from './observability.ts';
import { verdictItem } from './verdict.ts';
import { DOUBT_GRADES, STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS } from './words.ts';

const share = z.number().min(0).max(1);

/** What a place on the list is worth: the factors and their product. A factor that is not known is null and counts as zero. */
export const priority = z.object({
  pNone: share,
  pAlone: share.nullable(),
  stability: share.nullable(),
  /** Dark hours over those of the best placed one; null where no site was named, and then it does not count. */
  visibility: share.nullable(),
  /** The product. */
  value: share,
});
export type Priority = z.output<typeof priority>;

export const shortlistEntry = z.object({
  detectionId: z.uuid(),
  rank: z.int(),
  reason: z.string(),
  /** What it would prove if follow-up finds nothing. */
  nullResult: z.string(),
  priority: priority.nullable(),
  verdict: verdictItem.nullable(),
  /** Why it cannot be frozen as it stands: its settled word is gone or its evidence moved. Null while it can. */
  notReady: z.string().nullable(),
});
export type ShortlistEntry = z.output<typeof shortlistEntry>;
export const shortlist = z.object({
  runId: z.uuid().nullable(),
  runNumber: z.int().nullable(),
  version: z.int(),
  entries: z.array(shortlistEntry),
});
export type Shortlist = z.output<typeof shortlist>;

const words = z.string().trim().max(2000).default('');
export const putShortlistRequest = z.strictObject({
  runId: z.uuid(),
  entries: z.array(z.strictObject({ detectionId: z.uuid(), reason: words, nullResult: words })).max(10_000),
});
export type PutShortlistRequest = z.output<typeof putShortlistRequest>;

/** A rule that picks settled detections; verdicts are the lead's settled ones. */
export const shortlistRule = z.strictObject({
  runId: z.uuid(),
  starlight: z.array(z.enum(STARLIGHT_VERDICTS)).min(1).default(['dark', 'nearly dark']),
  surroundings: z.array(z.enum(SURROUNDINGS_VERDICTS)).min(1).default(['alone']),
  minPNone: share.default(0),
  minPAlone: share.default(0),
  /** Least stability of both verdicts. */
  minStability: share.default(0),
  /** Gravest doubt that may stand. */
  worstDoubt: z.enum(DOUBT_GRADES).extract(['clear', 'watch', 'serious']).default('watch'),
  /** Ranks by what a site can see, too. */
  observe: observabilityQuery.optional(),
  /** The best so many; all that fit where absent. */
  limit: z.int().min(1).max(10_000).optional(),
});
export type ShortlistRule = z.output<typeof shortlistRule>;

/** What a rule comes to: those that fit, best first, and those whose computed verdict fits but which are not settled. */
export const shortlistProposal = z.object({
  runNumber: z.int(),
  entries: z.array(
    z.object({
      detectionId: z.uuid(),
      name: z.string(),
      reason: z.string(),
      priority,
      /** Dark hours from the site named. */
      hours: z.number().nullable(),
      isOn: z.boolean(),
    }),
  ),
  refused: z.array(z.object({ detectionId: z.uuid(), name: z.string(), why: z.string() })),
});
export type ShortlistProposal = z.output<typeof shortlistProposal>;
