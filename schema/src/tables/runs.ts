import {
  doublePrecision,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { at, bytea, createdAt, id } from '../columns.ts';
import { users } from './people.ts';
import { detections, surveys } from './surveys.ts';

export const criteria = pgTable(
  'criteria',
  {
    id: id(),
    surveyId: uuid('survey_id')
      .notNull()
      .references(() => surveys.id),
    number: integer('number').notNull(),
    /** All keys, defaults filled in. */
    settings: jsonb('settings').notNull(),
    note: text('note').notNull().default(''),
    createdBy: uuid('created_by')
      .notNull()
      .references(() => users.id),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex('criteria_number').on(table.surveyId, table.number)],
);

export const runs = pgTable(
  'runs',
  {
    id: id(),
    surveyId: uuid('survey_id')
      .notNull()
      .references(() => surveys.id),
    number: integer('number').notNull(),
    criteriaId: uuid('criteria_id')
      .notNull()
      .references(() => criteria.id),
    jobId: uuid('job_id'),
    state: text('state').notNull().default('queued'),
    /** [{catalogueId, name, kind, rows, sha256 (content hash)}] */
    inputs: jsonb('inputs').notNull(),
    /** Over criteria, inputs, overrides, replaced distances, cosmology and code version. */
    inputHash: text('input_hash').notNull(),
    /** Overrides and replaced distances as they stood. */
    decisions: jsonb('decisions').notNull().default({}),
    codeVersion: text('code_version').notNull(),
    counts: jsonb('counts'),
    control: jsonb('control'),
    /** Sentences about the run as a whole: what was learnt, what was assumed. */
    notes: jsonb('notes').notNull().default([]),
    /** What the engine learnt from the survey before it scored; previews go by it. */
    learnt: jsonb('learnt'),
    error: text('error'),
    createdBy: uuid('created_by')
      .notNull()
      .references(() => users.id),
    startedAt: at('started_at'),
    finishedAt: at('finished_at'),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex('runs_number').on(table.surveyId, table.number)],
);

/** One detection of one run: immutable once the run is done. */
export const verdicts = pgTable(
  'verdicts',
  {
    runId: uuid('run_id')
      .notNull()
      .references(() => runs.id, { onDelete: 'cascade' }),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id),
    /** Place in the input order. */
    position: integer('position').notNull(),
    name: text('name').notNull(),
    raDeg: doublePrecision('ra_deg').notNull(),
    decDeg: doublePrecision('dec_deg').notNull(),
    velocityKms: doublePrecision('velocity_kms'),
    distanceMpc: doublePrecision('distance_mpc'),
    logHiMass: doublePrecision('log_hi_mass'),
    starlight: text('starlight').notNull(),
    pNone: doublePrecision('p_none').notNull(),
    pMissed: doublePrecision('p_missed').notNull(),
    pSpurious: doublePrecision('p_spurious').notNull(),
    power: doublePrecision('power'),
    surroundings: text('surroundings').notNull(),
    pAlone: doublePrecision('p_alone'),
    /** The contract's verdictItem, whole, but for settled, reviews and overrides. */
    item: jsonb('item').notNull(),
    /** The contract's verdictDetail without candidates and neighbours. */
    detail: jsonb('detail').notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.runId, table.detectionId] }),
    index('verdicts_order').on(table.runId, table.position),
  ],
);

/** Candidates and neighbours of one verdict, packed columns (service/src/tiles/column-pack.ts). */
export const evidence = pgTable(
  'evidence',
  {
    runId: uuid('run_id')
      .notNull()
      .references(() => runs.id, { onDelete: 'cascade' }),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id),
    candidates: bytea('candidates').notNull(),
    neighbours: bytea('neighbours').notNull(),
  },
  (table) => [primaryKey({ columns: [table.runId, table.detectionId] })],
);

export const jobs = pgTable(
  'jobs',
  {
    id: id(),
    kind: text('kind').notNull(),
    surveyId: uuid('survey_id').references(() => surveys.id),
    createdBy: uuid('created_by').references(() => users.id),
    state: text('state').notNull().default('queued'),
    progress: doublePrecision('progress').notNull().default(0),
    message: text('message').notNull().default(''),
    payload: jsonb('payload').notNull(),
    result: jsonb('result'),
    error: jsonb('error'),
    cancelRequestedAt: at('cancel_requested_at'),
    heartbeatAt: at('heartbeat_at'),
    /** How often it was begun: work that kills its process must not do so for ever. */
    attempts: integer('attempts').notNull().default(0),
    startedAt: at('started_at'),
    finishedAt: at('finished_at'),
    createdAt: createdAt(),
  },
  (table) => [index('jobs_state').on(table.state)],
);

/** Answers kept for a repeated POST with the same Idempotency-Key. */
export const idempotentAnswers = pgTable(
  'idempotent_answers',
  {
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    key: text('key').notNull(),
    path: text('path').notNull(),
    bodyHash: text('body_hash').notNull(),
    status: integer('status'),
    answer: jsonb('answer'),
    createdAt: createdAt(),
  },
  (table) => [primaryKey({ columns: [table.userId, table.key] })],
);
