import { z } from 'zod';

/** Kinds of files that may go with a note; told by their first bytes, not by their names. */
export const ATTACHMENT_TYPES = [
  'image/png',
  'image/jpeg',
  'application/pdf',
  'application/fits',
  'text/plain',
  'text/csv',
] as const;
/** Largest attachment, bytes. */
export const ATTACHMENT_BYTES = 5_000_000;
/** Most attachments of one note. */
export const ATTACHMENTS_OF_A_NOTE = 5;

export const attachment = z.object({
  id: z.uuid(),
  fileName: z.string(),
  mediaType: z.enum(ATTACHMENT_TYPES),
  bytes: z.int(),
  sha256: z.string(),
});
export type Attachment = z.output<typeof attachment>;

/** Files uploaded before for the detection, to go with the note. */
export const attachmentIds = z
  .array(z.uuid())
  .max(ATTACHMENTS_OF_A_NOTE, `at most ${ATTACHMENTS_OF_A_NOTE} attachments go with a note`)
  .default([]);
