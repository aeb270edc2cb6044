import { z } from 'zod';
import { rowNumber } from './list.ts';
import { note } from './note.ts';

/** A question a new version of a table raised: which of its rows is the source that people's words were given on. */
export const binding = z.object({
  id: z.uuid(),
  kind: z.enum(['detection', 'object']),
  detectionId: z.uuid(),
  /** Of the source in the earlier version. */
  name: z.string(),
  catalogueId: z.uuid(),
  catalogueName: z.string(),
  state: z.enum(['sure', 'open', 'answered', 'dropped']),
  candidates: z.array(z.object({ row: z.int(), name: z.string(), separationArcsec: z.number() })),
  row: z.int().nullable(),
  /** Words that hang on it: `rejected as counterpart by ...`. */
  words: z.array(z.string()),
});
export type Binding = z.output<typeof binding>;

/** The row that is meant, or null where none of them is: its words then stay with the earlier version. */
export const answerBindingRequest = z.strictObject({ row: rowNumber.nullable(), note: note.default('') });
export type AnswerBindingRequest = z.output<typeof answerBindingRequest>;
