import { z } from 'zod';

/** Counts of the magnitudes of one band: bin `i` runs from `start + i * step` to the next, limits left out. */
export const bandCounts = z.object({
  band: z.string(),
  system: z.enum(['AB', 'Vega']),
  depth5Sigma: z.number().nullable(),
  /** Where the counts turn over, with its uncertainty; never used unless a person sets it as the depth. */
  suggestedDepth: z.object({ magnitude: z.number(), uncertainty: z.number() }).nullable(),
  count: z.int(),
  limits: z.int(),
  brightest: z.number(),
  faintest: z.number(),
  start: z.number(),
  step: z.number(),
  counts: z.array(z.int()),
});
export type BandCounts = z.output<typeof bandCounts>;
