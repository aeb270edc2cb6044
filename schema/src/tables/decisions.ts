import { bigserial, index, integer, jsonb, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { sql } from 'drizzle-orm';
import { at, createdAt, id } from '../columns.ts';
import { users } from './people.ts';
import { runs } from './runs.ts';
import { catalogues, detections, surveys } from './surveys.ts';

/** A reviewer's word on one detection of one run; a later one of the same reviewer supersedes it. */
export const reviews = pgTable(
  'reviews',
  {
    id: id(),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id),
    runId: uuid('run_id')
      .notNull()
      .references(() => runs.id),
    reviewerId: uuid('reviewer_id')
      .notNull()
      .references(() => users.id),
    starlight: text('starlight').notNull(),
    surroundings: text('surroundings').notNull(),
    note: text('note').notNull(),
    supersededAt: at('superseded_at'),
    createdAt: createdAt(),
  },
  (table) => [index('reviews_detection').on(table.detectionId)],
);

/** The lead's settled word. */
export const settlements = pgTable(
  'settlements',
  {
    id: id(),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id),
    runId: uuid('run_id')
      .notNull()
      .references(() => runs.id),
    settledBy: uuid('settled_by')
      .notNull()
      .references(() => users.id),
    starlight: text('starlight').notNull(),
    surroundings: text('surroundings').notNull(),
    note: text('note').notNull(),
    supersededAt: at('superseded_at'),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('settlements_current')
      .on(table.detectionId)
      .where(sql`superseded_at is null`),
  ],
);

/** A person accepts or rejects one catalogue row as a detection's counterpart. */
export const overrides = pgTable(
  'overrides',
  {
    id: id(),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id),
    catalogueId: uuid('catalogue_id')
      .notNull()
      .references(() => catalogues.id),
    row: integer('row').notNull(),
    objectName: text('object_name').notNull(),
    action: text('action').notNull(),
    note: text('note').notNull(),
    createdBy: uuid('created_by')
      .notNull()
      .references(() => users.id),
    withdrawnAt: at('withdrawn_at'),
    withdrawnBy: uuid('withdrawn_by').references(() => users.id),
    withdrawnNote: text('withdrawn_note'),
    createdAt: createdAt(),
  },
  (table) => [
    index('overrides_detection').on(table.detectionId),
    uniqueIndex('overrides_current')
      .on(table.detectionId, table.catalogueId, table.row)
      .where(sql`withdrawn_at is null`),
  ],
);

export const assignments = pgTable(
  'assignments',
  {
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id),
    createdAt: createdAt(),
  },
  (table) => [primaryKey({ columns: [table.detectionId, table.userId] })],
);

export const shortlists = pgTable('shortlists', {
  surveyId: uuid('survey_id')
    .primaryKey()
    .references(() => surveys.id),
  runId: uuid('run_id').references(() => runs.id),
  /** Grows by one with each change; the ETag. */
  version: integer('version').notNull().default(0),
  updatedAt: at('updated_at').notNull().defaultNow(),
});

export const shortlistEntries = pgTable(
  'shortlist_entries',
  {
    surveyId: uuid('survey_id')
      .notNull()
      .references(() => surveys.id),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id),
    rank: integer('rank').notNull(),
    reason: text('reason').notNull().default(''),
    nullResult: text('null_result').notNull().default(''),
  },
  (table) => [primaryKey({ columns: [table.surveyId, table.detectionId] })],
);

/** Append only; each hash covers the line and the hash before it. */
export const ledger = pgTable(
  'ledger',
  {
    id: bigserial('id', { mode: 'number' }).primaryKey(),
    surveyId: uuid('survey_id')
      .notNull()
      .references(() => surveys.id),
    number: integer('number').notNull(),
    at: at('at').notNull(),
    actorId: uuid('actor_id').references(() => users.id),
    actor: text('actor').notNull(),
    action: text('action').notNull(),
    subject: text('subject').notNull(),
    note: text('note').notNull().default(''),
    detail: jsonb('detail').notNull().default({}),
    previousHash: text('previous_hash').notNull(),
    hash: text('hash').notNull(),
  },
  (table) => [uniqueIndex('ledger_number').on(table.surveyId, table.number)],
);
