import { z } from 'zod';

/** Where a catalogue has looked; elsewhere its silence says nothing. */
export const coverage = z.object({
  type: z.string(),
  /** Square degrees; null when unknown. */
  areaSqDeg: z.number().nullable(),
  /** MOC in ASCII, or null. */
  moc: z.string().nullable(),
  /** How the region was found, or why there is none. */
  note: z.string(),
});
export type Coverage = z.output<typeof coverage>;
