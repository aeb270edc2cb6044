import { z } from 'zod';
import { attachmentIds, attachment } from './attachment.ts';
import { moved } from './evidence-moved.ts';
import { listQuery, rowNumber } from './list.ts';
import { note } from './note.ts';
import { DOUBT_GRADES, STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS } from './words.ts';

/** What a reviewer says: a verdict, or in its place that there is nothing to give one on, or that it must wait. */
export const REVIEW_OUTCOMES = ['verdict', 'not real', 'not extragalactic', 'needs an HI spectrum'] as const;
export type ReviewOutcome = (typeof REVIEW_OUTCOMES)[number];
const outcome = z.enum(REVIEW_OUTCOMES);
const words = { starlight: z.enum(STARLIGHT_VERDICTS), surroundings: z.enum(SURROUNDINGS_VERDICTS) };

export const createReviewRequest = z.strictObject({
  runId: z.uuid(),
  ...words,
  outcome: outcome.default('verdict'),
  /** Required where the review departs from the computed verdict, or gives none. */
  note: note.default(''),
  attachmentIds,
});
export type CreateReviewRequest = z.output<typeof createReviewRequest>;

export const review = z.object({
  id: z.uuid(),
  detectionId: z.uuid(),
  runId: z.uuid(),
  runNumber: z.int(),
  reviewer: z.string(),
  mine: z.boolean(),
  ...words,
  outcome,
  note: z.string(),
  agrees: z.boolean(),
  /** Given before another's word on the same run could be seen. */
  blind: z.boolean(),
  createdAt: z.iso.datetime(),
  /** Number of the latest run it was carried into because its evidence stands. */
  carriedTo: z.int().nullable(),
  /** In the latest run, where its evidence moved. */
  returned: z.object({ runNumber: z.int(), moved: z.array(moved) }).nullable(),
  attachments: z.array(attachment),
});
export type Review = z.output<typeof review>;

export const createOverrideRequest = z.strictObject({
  catalogueId: z.uuid(),
  rowId: rowNumber,
  action: z.enum(['accept', 'reject']),
  note: note.min(1, 'say why: an override needs a note'),
  attachmentIds,
});
export type CreateOverrideRequest = z.output<typeof createOverrideRequest>;
export const withdrawRequest = z.strictObject({ note: note.min(1, 'say why: a note is needed') });

export const override = z.object({
  id: z.uuid(),
  detectionId: z.uuid(),
  catalogueId: z.uuid(),
  rowId: z.int(),
  objectName: z.string(),
  action: z.enum(['accept', 'reject']),
  note: z.string(),
  by: z.string(),
  mine: z.boolean(),
  createdAt: z.iso.datetime(),
  /** Carried here from an earlier version of a table. */
  carried: z.boolean(),
  withdrawnAt: z.iso.datetime().nullable(),
  withdrawnBy: z.string().nullable(),
  withdrawnNote: z.string().nullable(),
  attachments: z.array(attachment),
});
export type Override = z.output<typeof override>;

export const settleRequest = z.strictObject({
  runId: z.uuid(),
  ...words,
  outcome: outcome.default('verdict'),
  note: note.min(1, 'say why: settling needs a note'),
  attachmentIds,
});
export type SettleRequest = z.output<typeof settleRequest>;

/** The lead's word in force on a detection. */
export const settlement = z.object({
  id: z.uuid(),
  detectionId: z.uuid(),
  runNumber: z.int(),
  ...words,
  outcome,
  note: z.string(),
  by: z.string(),
  mine: z.boolean(),
  createdAt: z.iso.datetime(),
  /** What moved since in the latest run; empty while the evidence stands. */
  moved: z.array(moved),
  attachments: z.array(attachment),
});
export type Settlement = z.output<typeof settlement>;

export const doubtWordRequest = z.strictObject({
  runId: z.uuid(),
  doubt: z.string().min(1).max(60),
  word: z.enum(['cleared', 'confirmed']),
  note: note.min(1, 'say why: a note is needed'),
  attachmentIds,
});
export type DoubtWordRequest = z.output<typeof doubtWordRequest>;

/** A person's word on a doubt. */
export const doubtWord = z.object({
  id: z.uuid(),
  detectionId: z.uuid(),
  doubt: z.string(),
  word: z.enum(['cleared', 'confirmed']),
  /** As graded when the word was given. */
  grade: z.enum(DOUBT_GRADES),
  note: z.string(),
  by: z.string(),
  mine: z.boolean(),
  createdAt: z.iso.datetime(),
  withdrawnAt: z.iso.datetime().nullable(),
  withdrawnBy: z.string().nullable(),
  withdrawnNote: z.string().nullable(),
  attachments: z.array(attachment),
});
export type DoubtWord = z.output<typeof doubtWord>;

/** How far a reviewer is with what was assigned; on the latest finished run. */
export const reviewerProgress = z.object({
  userId: z.uuid(),
  name: z.string(),
  assigned: z.int(),
  /** Of those assigned. */
  reviewed: z.int(),
  /** Of those assigned, how many came back because their evidence moved. */
  returned: z.int(),
});
export type ReviewerProgress = z.output<typeof reviewerProgress>;
export const assignmentsRequest = z.strictObject({
  detectionIds: z.array(z.uuid()).min(1).max(10_000),
  userId: z.uuid(),
});
export const assignmentsQuery = listQuery;
