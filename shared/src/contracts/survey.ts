import { z } from 'zod';
import { STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS, TEAM_ROLES } from './words.ts';

export const cosmology = z.strictObject({
  /** Hubble constant, km/s/Mpc. */
  h0: z.number().min(20).max(200).default(70),
  /** Matter density of a flat universe. */
  omegaM: z.number().min(0).max(1).default(0.3),
});
export type Cosmology = z.output<typeof cosmology>;

export const createSurveyRequest = z.strictObject({
  teamId: z.uuid(),
  name: z.string().trim().min(1).max(120),
  description: z.string().trim().max(4000).default(''),
  cosmology: cosmology.prefault({}),
});
export type CreateSurveyRequest = z.output<typeof createSurveyRequest>;

export const updateSurveyRequest = z.strictObject({
  name: z.string().trim().min(1).max(120).optional(),
  description: z.string().trim().max(4000).optional(),
  cosmology: cosmology.optional(),
});
export type UpdateSurveyRequest = z.output<typeof updateSurveyRequest>;

export const survey = z.object({
  id: z.uuid(),
  teamId: z.uuid(),
  teamName: z.string(),
  role: z.enum(TEAM_ROLES),
  name: z.string(),
  description: z.string(),
  cosmology,
  createdAt: z.iso.datetime(),
  detections: z.int(),
  catalogues: z.int(),
  latestRun: z
    .object({ id: z.uuid(), number: z.int(), state: z.string(), finishedAt: z.iso.datetime().nullable() })
    .nullable(),
});
export type Survey = z.output<typeof survey>;

/** What the overview page shows at once. */
export const surveyOverview = z.object({
  survey,
  counts: z.object({
    starlight: z.partialRecord(z.enum(STARLIGHT_VERDICTS), z.int()),
    surroundings: z.partialRecord(z.enum(SURROUNDINGS_VERDICTS), z.int()),
  }),
  /** One mark a detection for the sky map; verdicts are those of the latest finished run. */
  marks: z.array(
    z.object({
      detectionId: z.uuid(),
      name: z.string(),
      raDeg: z.number(),
      decDeg: z.number(),
      starlight: z.enum(STARLIGHT_VERDICTS).nullable(),
      surroundings: z.enum(SURROUNDINGS_VERDICTS).nullable(),
    }),
  ),
  reviewed: z.int(),
  awaitingMe: z.int(),
});
export type SurveyOverview = z.output<typeof surveyOverview>;
