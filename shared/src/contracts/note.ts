import { z } from 'zod';

/** Most characters of a note; what is longer belongs into an attachment. */
export const NOTE_LENGTH = 4000;

export const note = z
  .string()
  .trim()
  .max(NOTE_LENGTH, `a note has at most ${NOTE_LENGTH} characters; put what is longer into an attachment`);

/** Phrases a team keeps at hand for its notes, in the order they are offered. */
export const notePhrases = z.strictObject({ phrases: z.array(z.string().trim().min(1).max(200)).max(40) });
export type NotePhrases = z.output<typeof notePhrases>;
