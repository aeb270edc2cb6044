import { z } from 'zod';
import { listQuery } from './list.ts';

export const detection = z.object({
  id: z.uuid(),
  surveyId: z.uuid(),
  catalogueId: z.uuid(),
  row: z.int(),
  name: z.string(),
  raDeg: z.number(),
  decDeg: z.number(),
  velocityKms: z.number().nullable(),
  width50Kms: z.number().nullable(),
  fluxJyKms: z.number().nullable(),
  signalToNoise: z.number().nullable(),
  reliability: z.number().nullable(),
  /** As in the table, or as replaced by a person. */
  distanceMpc: z.number().nullable(),
  distanceErrorMpc: z.number().nullable(),
  distanceOverride: z
    .object({
      distanceMpc: z.number(),
      errorMpc: z.number().nullable(),
      source: z.string(),
      note: z.string(),
      by: z.string(),
      at: z.iso.datetime(),
    })
    .nullable(),
});
export type Detection = z.output<typeof detection>;

export const detectionsQuery = listQuery.extend({ search: z.string().max(200).optional() });

/** The survey's positions as a file for an archive's list search; the radius is the same for all. */
export const positionsQuery = z.object({
  format: z.enum(['csv', 'votable']).default('csv'),
  radiusArcsec: z.coerce.number().positive().max(36_000),
});

/** Replaces a detection's distance, or with null returns to the table's. */
export const updateDetectionRequest = z.strictObject({
  distanceMpc: z.number().positive().max(20_000).nullable(),
  errorMpc: z.number().positive().max(20_000).nullable().default(null),
  source: z.string().trim().max(500).default(''),
  note: z.string().trim().min(1, 'say why: a note is needed').max(4000),
});
export type UpdateDetectionRequest = z.output<typeof updateDetectionRequest>;
