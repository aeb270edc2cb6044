import { z } from 'zod';
import { listQuery, rowNumber } from './list.ts';
import { verdictSort } from './run.ts';
import { verdictItem } from './verdict.ts';
import { STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS } from './words.ts';

const note = z.string().trim().max(4000);

export const createReviewRequest = z.strictObject({
  runId: z.uuid(),
  starlight: z.enum(STARLIGHT_VERDICTS),
  surroundings: z.enum(SURROUNDINGS_VERDICTS),
  /** Required where the review departs from the computed verdict. */
  note: note.default(''),
});
export type CreateReviewRequest = z.output<typeof createReviewRequest>;

export const review = z.object({
  id: z.uuid(),
  detectionId: z.uuid(),
  runId: z.uuid(),
  runNumber: z.int(),
  reviewer: z.string(),
  mine: z.boolean(),
  starlight: z.enum(STARLIGHT_VERDICTS),
  surroundings: z.enum(SURROUNDINGS_VERDICTS),
  note: z.string(),
  agrees: z.boolean(),
  createdAt: z.iso.datetime(),
});
export type Review = z.output<typeof review>;

export const createOverrideRequest = z.strictObject({
  catalogueId: z.uuid(),
  rowId: rowNumber,
  action: z.enum(['accept', 'reject']),
  note: note.min(1, 'say why: an override needs a note'),
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
  createdAt: z.iso.datetime(),
  withdrawnAt: z.iso.datetime().nullable(),
  withdrawnBy: z.string().nullable(),
  withdrawnNote: z.string().nullable(),
});
export type Override = z.output<typeof override>;

export const settleRequest = z.strictObject({
  runId: z.uuid(),
  starlight: z.enum(STARLIGHT_VERDICTS),
  surroundings: z.enum(SURROUNDINGS_VERDICTS),
  note: note.min(1, 'say why: settling needs a note'),
});
export type SettleRequest = z.output<typeof settleRequest>;

export const docketQuery = listQuery.extend({
  sort: verdictSort,
  assigned: z.enum(['me', 'all']).default('all'),
  state: z.enum(['open', 'done', 'all']).default('open'),
});
export const docketItem = verdictItem.extend({ assignedTo: z.array(z.string()), reviewedByMe: z.boolean() });
/** How far a reviewer is with what was assigned; on the latest finished run. */
export const reviewerProgress = z.object({
  userId: z.uuid(),
  name: z.string(),
  assigned: z.int(),
  /** Of those assigned. */
  reviewed: z.int(),
});
export type ReviewerProgress = z.output<typeof reviewerProgress>;
export const assignmentsRequest = z.strictObject({
  detectionIds: z.array(z.uuid()).min(1).max(10_000),
  userId: z.uuid(),
});
