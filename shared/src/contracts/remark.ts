import { z } from 'zod';
import { attachment, attachmentIds } from './attachment.ts';
import { note } from './note.ts';

/** Something said of a detection without deciding; those mentioned are written to. */
export const createRemarkRequest = z.strictObject({
  text: note.min(1, 'an empty remark says nothing'),
  /** Ids of members of the team. */
  mentions: z.array(z.uuid()).max(20).default([]),
  attachmentIds,
});
export type CreateRemarkRequest = z.output<typeof createRemarkRequest>;

export const remark = z.object({
  id: z.uuid(),
  detectionId: z.uuid(),
  author: z.string(),
  mine: z.boolean(),
  text: z.string(),
  mentions: z.array(z.object({ userId: z.uuid(), name: z.string() })),
  createdAt: z.iso.datetime(),
  attachments: z.array(attachment),
});
export type Remark = z.output<typeof remark>;
