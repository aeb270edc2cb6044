import { z } from 'zod';
import { listQuery } from './list.ts';
import { DOUBT_GRADES, STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS } from './words.ts';

export const createRunRequest = z.strictObject({
  criteriaId: z.uuid(),
  /** All published catalogues where absent. */
  catalogueIds: z.array(z.uuid()).max(200).optional(),
});
export type CreateRunRequest = z.output<typeof createRunRequest>;
export const runAccepted = z.object({ runId: z.uuid(), jobId: z.uuid() });

export const controlResult = z.object({
  offsetsPerSource: z.int(),
  positionsKept: z.int(),
  chanceMatches: z.int(),
  /** Share of shifted places at which an object would have been accepted, with its exact Poisson interval (68 per cent). */
  chanceFraction: z.number(),
  chanceInterval: z.tuple([z.number(), z.number()]),
  observedFraction: z.number(),
  trueFraction: z.number(),
  /** Detections without an accepted object (dark, missed or spurious), corrected for those hidden by chance objects. */
  correctedUnmatched: z.number(),
});

export const run = z.object({
  id: z.uuid(),
  surveyId: z.uuid(),
  number: z.int(),
  state: z.enum(['queued', 'running', 'done', 'failed', 'cancelled']),
  jobId: z.uuid().nullable(),
  criteriaId: z.uuid(),
  criteriaNumber: z.int(),
  inputs: z.array(
    z.object({ catalogueId: z.uuid(), name: z.string(), kind: z.string(), rows: z.int(), sha256: z.string() }),
  ),
  /** Hash over criteria, inputs and overrides: equal hashes give equal results. */
  inputHash: z.string(),
  counts: z
    .object({
      detections: z.int(),
      starlight: z.partialRecord(z.enum(STARLIGHT_VERDICTS), z.int()),
      surroundings: z.partialRecord(z.enum(SURROUNDINGS_VERDICTS), z.int()),
      candidates: z.int(),
      neighbours: z.int(),
    })
    .nullable(),
  control: controlResult.nullable(),
  notes: z.array(z.string()),
  error: z.string().nullable(),
  createdBy: z.string(),
  createdAt: z.iso.datetime(),
  finishedAt: z.iso.datetime().nullable(),
  seconds: z.number().nullable(),
});
export type Run = z.output<typeof run>;

export const VERDICT_SORTS = [
  'position',
  'name',
  'raDeg',
  'decDeg',
  'velocityKms',
  'distanceMpc',
  'logHiMass',
  'pNone',
  'pNoneOrMissed',
  'power',
  'pAlone',
  'starlight',
  'surroundings',
  'docket',
] as const;
/** A key of {@link VERDICT_SORTS}; a leading `-` turns it round. */
export const verdictSort = z
  .string()
  .refine((sort) => (VERDICT_SORTS as readonly string[]).includes(sort.replace(/^-/, '')), {
    error: `sort is one of ${VERDICT_SORTS.join(', ')}, with a leading - for descending`,
  })
  .optional();

/** Several words: repeated, or with commas between them. */
export const listOfWords = <const T extends readonly [string, ...string[]]>(words: T) =>
  z
    .union([z.string(), z.array(z.string())])
    .transform((value) => (Array.isArray(value) ? value : value.split(',')))
    .pipe(z.array(z.enum(words)))
    .optional();

export const verdictsQuery = listQuery.extend({
  sort: verdictSort,
  starlight: listOfWords(STARLIGHT_VERDICTS),
  surroundings: listOfWords(SURROUNDINGS_VERDICTS),
  doubt: z.string().max(60).optional(),
  doubtGrade: z.enum(DOUBT_GRADES).optional(),
  search: z.string().max(200).optional(),
  minPNone: z.coerce.number().min(0).max(1).optional(),
  reviewed: z.enum(['yes', 'no']).optional(),
});
export type VerdictsQuery = z.output<typeof verdictsQuery>;

export const evidenceQuery = listQuery.extend({
  /** A page as JSON, or the whole list as a table. */
  format: z.enum(['json', 'csv', 'votable', 'fits', 'mrt']).default('json'),
  detectionId: z.uuid().optional(),
});

export const runDifference = z.object({
  from: z.object({ id: z.uuid(), number: z.int() }),
  to: z.object({ id: z.uuid(), number: z.int() }),
  criteriaChanged: z.array(z.object({ key: z.string(), from: z.unknown(), to: z.unknown() })),
  inputsChanged: z.array(z.string()),
  /** People's words that one run took up and the other did not: replaced distances, counterparts accepted or rejected. */
  decisionsChanged: z.array(z.object({ detectionId: z.uuid().nullable(), name: z.string(), change: z.string() })),
  changed: z.array(
    z.object({
      detectionId: z.uuid(),
      name: z.string(),
      starlight: z.tuple([z.string().nullable(), z.string().nullable()]),
      surroundings: z.tuple([z.string().nullable(), z.string().nullable()]),
      pNone: z.tuple([z.number().nullable(), z.number().nullable()]),
      /** What moved, in sentences. */
      why: z.array(z.string()),
      /** Which changed input did it, its own first; those of the whole survey where none is its own. */
      causes: z.array(z.string()),
    }),
  ),
  unchanged: z.int(),
});
