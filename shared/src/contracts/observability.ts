import { z } from 'zod';

/** A place to observe from. Longitude east of Greenwich. */
export const site = z.strictObject({
  name: z.string().trim().min(1).max(100),
  latitudeDeg: z.coerce.number().min(-90).max(90),
  longitudeDeg: z.coerce.number().min(-180).max(360),
  heightM: z.coerce.number().min(-500).max(9000).default(0),
});
export type Site = z.output<typeof site>;

/** `2026A` is February to July 2026, `2026B` August 2026 to January 2027. */
export const semester = z.string().regex(/^(19|20)\d\d[AB]$/, 'a semester is a year and A or B, such as 2026B');

export const observabilityQuery = z.strictObject({
  name: z.string().trim().min(1).max(100).default('site'),
  latitudeDeg: z.coerce.number().min(-90).max(90),
  longitudeDeg: z.coerce.number().min(-180).max(360),
  heightM: z.coerce.number().min(-500).max(9000).default(0),
  semester,
  maximumAirmass: z.coerce.number().gt(1).max(5).default(1.5),
  /** Sun this far below the horizon, degrees. */
  twilightDeg: z.coerce.number().min(0).max(18).default(18),
});
export type ObservabilityQuery = z.output<typeof observabilityQuery>;

/** How well one position can be observed from a site in a semester. */
export const observability = z.object({
  detectionId: z.uuid(),
  name: z.string(),
  raDeg: z.number(),
  decDeg: z.number(),
  /** Dark hours below the airmass, summed over the semester. */
  hours: z.number(),
  /** The same in its best night, and that night's date (of its evening, local mean time). */
  bestNightHours: z.number(),
  bestNight: z.iso.date().nullable(),
  /** Night in which it transits nearest to the middle of the dark. */
  transitDate: z.iso.date().nullable(),
  /** Airmass at transit; null where it never rises. */
  leastAirmass: z.number().nullable(),
  /** Degrees to the Moon at the middle of the transit night. */
  moonSeparationDeg: z.number().nullable(),
});
export type Observability = z.output<typeof observability>;
export const observabilityAnswer = z.object({
  site,
  semester,
  from: z.iso.date(),
  to: z.iso.date(),
  maximumAirmass: z.number(),
  twilightDeg: z.number(),
  items: z.array(observability),
});
export type ObservabilityAnswer = z.output<typeof observabilityAnswer>;
