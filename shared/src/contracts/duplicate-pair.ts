import { z } from 'zod';

/** A row of an HI list, as far as it takes to tell two apart. */
export const listedSource = z.object({
  row: z.int(),
  name: z.string().nullable(),
  raDeg: z.number(),
  decDeg: z.number(),
  /** Optical convention, barycentric, km/s. */
  velocityKms: z.number(),
  signalToNoise: z.number().nullable(),
});

/** Two rows of an HI list that seem one source detected twice. */
export const duplicatePair = z.object({
  /** The row of the higher signal-to-noise ratio, which stays when they are merged. */
  better: listedSource,
  other: listedSource,
  separationArcsec: z.number(),
  differenceKms: z.number(),
});
export type DuplicatePair = z.output<typeof duplicatePair>;
