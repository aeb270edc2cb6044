import { z } from 'zod';

/** That something was done in a survey; what came of it is asked for anew, and only by those who may see it. */
export const surveyEvent = z.object({
  /** Of the line in the ledger. */
  number: z.int(),
  at: z.iso.datetime(),
  actor: z.string(),
  mine: z.boolean(),
  action: z.string(),
  subject: z.string(),
  detectionId: z.uuid().nullable(),
});
export type SurveyEvent = z.output<typeof surveyEvent>;
