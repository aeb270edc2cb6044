import { z } from 'zod';

/** Cohen's kappa of two reviewers; null where it is not defined (both always said the same one word). */
export const kappa = z.object({
  kappa: z.number().nullable(),
  /** Large-sample standard error. */
  standardError: z.number().nullable(),
  observed: z.number(),
  expected: z.number(),
});

/** How far two reviewers agree, where both spoke blind on the same run. */
export const agreement = z.object({
  reviewers: z.tuple([z.string(), z.string()]),
  detections: z.int(),
  starlight: kappa,
  surroundings: kappa,
});
export type Agreement = z.output<typeof agreement>;
