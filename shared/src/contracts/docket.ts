import { z } from 'zod';
import { moved } from './evidence-moved.ts';
import { listQuery } from './list.ts';
import { REVIEW_OUTCOMES } from './review.ts';
import { listOfWords, VERDICT_SORTS } from './run.ts';
import { verdictItem } from './verdict.ts';
import { DOUBT_GRADES, STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS } from './words.ts';

/** Orders of what matters, besides the columns. */
export const DOCKET_ORDERS = ['docket', 'doubt', 'disagreement', 'returned'] as const;
const SORTS: readonly string[] = [...VERDICT_SORTS, ...DOCKET_ORDERS];

export const docketQuery = listQuery.extend({
  sort: z
    .string()
    .refine((sort) => SORTS.includes(sort.replace(/^-/, '')), { error: `sort is one of ${SORTS.join(', ')}` })
    .optional(),
  /** `me`, `all`, `nobody`, or the id of an account. */
  assigned: z.union([z.enum(['me', 'all', 'nobody']), z.uuid()]).default('all'),
  state: z.enum(['open', 'done', 'all']).default('open'),
  starlight: listOfWords(STARLIGHT_VERDICTS),
  surroundings: listOfWords(SURROUNDINGS_VERDICTS),
  doubtGrade: z.enum(DOUBT_GRADES).optional(),
  search: z.string().max(200).optional(),
  /** Only those whose evidence moved since a word was given. */
  returned: z.literal('yes').optional(),
  /** Only those on which reviewers differ; a reviewer is told only where she has spoken. */
  disagreement: z.literal('yes').optional(),
  settled: z.enum(['yes', 'no']).optional(),
  /** Only those that a reviewer answered so; likewise. */
  outcome: z.enum(REVIEW_OUTCOMES).optional(),
});
export type DocketQuery = z.output<typeof docketQuery>;

export const docketItem = verdictItem.extend({
  assignedTo: z.array(z.string()),
  reviewedByMe: z.boolean(),
  /** Reviewers differ; null where this may not be told yet. */
  disagreement: z.boolean().nullable(),
  /** What moved since my word, or since the lead settled; empty where it stands. */
  moved: z.array(moved),
});
export type DocketItem = z.output<typeof docketItem>;
