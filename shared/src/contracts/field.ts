import { z } from 'zod';
import { CATALOGUE_KINDS } from './words.ts';

/** Objects of a field at most: what a sky panel still moves at speed. */
export const MOST_FIELD_OBJECTS = 20_000;

export const fieldQuery = z.object({
  /** About the detection, arcsec. */
  radiusArcsec: z.coerce.number().positive().max(7200),
});

/** Objects of one table in a field, column by column; every column has the same length. */
export const fieldTable = z.object({
  catalogueId: z.uuid(),
  name: z.string(),
  kind: z.enum(CATALOGUE_KINDS),
  /** Half-power beam of an HI list, arcsec. */
  beamArcsec: z.object({ major: z.number(), minor: z.number(), angleDeg: z.number() }).nullable(),
  /** Rows inside the radius, handed out or not. */
  inside: z.int(),
  rowId: z.array(z.int()),
  objectName: z.array(z.string()),
  raDeg: z.array(z.number()),
  decDeg: z.array(z.number()),
  separationArcsec: z.array(z.number()),
  magnitude: z.array(z.number().nullable()),
  /** Band of the magnitude; null where there is none. */
  band: z.array(z.string().nullable()),
  /** cz difference / (1 + z of the detection), km/s. */
  velocityDifferenceKms: z.array(z.number().nullable()),
  isStar: z.array(z.boolean()),
});
export type FieldTable = z.output<typeof fieldTable>;

/** What the tables of a run hold about one detection, whatever its bearing on the verdict. */
export const field = z.object({
  radiusArcsec: z.number(),
  /** HI lists first, then as in the run. */
  tables: z.array(fieldTable),
  /** Fainter rows without a velocity were left out, so that at most {@link MOST_FIELD_OBJECTS} are handed out. */
  isCut: z.boolean(),
});
export type Field = z.output<typeof field>;
