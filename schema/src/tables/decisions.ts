import {
  boolean,
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
import { sql } from 'drizzle-orm';
import { at, createdAt, id } from '../columns.ts';
import { users } from './people.ts';
import { runs } from './runs.ts';
import { catalogues, detections, surveys } from './surveys.ts';

/**
 * A reviewer's word on one detection of one run; a later one of the same reviewer supersedes it. Where the evidence stands
 * in a later run the word is carried there as a row of its own, which names the one that was given.
 */
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
    /** `verdict`, or what the reviewer says in place of one. */
    outcome: text('outcome').notNull().default('verdict'),
    note: text('note').notNull(),
    /** Given before another's word on the same run could be seen: only these count for the agreement of two reviewers. */
    blind: boolean('blind').notNull().default(true),
    /** The review this row carries into a later run. */
    carriedFrom: uuid('carried_from'),
    supersededAt: at('superseded_at'),
    withdrawnAt: at('withdrawn_at'),
    createdAt: createdAt(),
  },
  (table) => [
    index('reviews_detection').on(table.detectionId),
    index('reviews_run').on(table.runId),
    uniqueIndex('reviews_current')
      .on(table.detectionId, table.runId, table.reviewerId)
      .where(sql`superseded_at is null`),
  ],
);

/** A review whose evidence moved: its detection comes back to the reviewer, marked with what moved. */
export const returns = pgTable(
  'returns',
  {
    runId: uuid('run_id')
      .notNull()
      .references(() => runs.id, { onDelete: 'cascade' }),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id, { onDelete: 'cascade' }),
    reviewerId: uuid('reviewer_id')
      .notNull()
      .references(() => users.id),
    reviewId: uuid('review_id')
      .notNull()
      .references(() => reviews.id),
    /** The contract's `moved`. */
    moved: jsonb('moved').notNull(),
  },
  (table) => [primaryKey({ columns: [table.runId, table.detectionId, table.reviewerId] })],
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
    outcome: text('outcome').notNull().default('verdict'),
    note: text('note').notNull(),
    carriedFrom: uuid('carried_from'),
    /** What moved since in the latest finished run; null while the evidence stands. */
    moved: jsonb('moved'),
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
      .references(() => detections.id, { onDelete: 'cascade' }),
    catalogueId: uuid('catalogue_id')
      .notNull()
      .references(() => catalogues.id, { onDelete: 'cascade' }),
    row: integer('row').notNull(),
    objectName: text('object_name').notNull(),
    /** Where the object stands: by this and its name it is found again in a new version of its table. */
    raDeg: doublePrecision('ra_deg'),
    decDeg: doublePrecision('dec_deg'),
    action: text('action').notNull(),
    note: text('note').notNull(),
    carriedFrom: uuid('carried_from'),
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

/** A person's word on a doubt: cleared by what the catalogues cannot know, or confirmed. */
export const doubtWords = pgTable(
  'doubt_words',
  {
    id: id(),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id, { onDelete: 'cascade' }),
    runId: uuid('run_id')
      .notNull()
      .references(() => runs.id),
    doubt: text('doubt').notNull(),
    word: text('word').notNull(),
    /** As graded when the word was given. */
    grade: text('grade').notNull(),
    note: text('note').notNull(),
    carriedFrom: uuid('carried_from'),
    createdBy: uuid('created_by')
      .notNull()
      .references(() => users.id),
    withdrawnAt: at('withdrawn_at'),
    withdrawnBy: uuid('withdrawn_by').references(() => users.id),
    withdrawnNote: text('withdrawn_note'),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('doubt_words_current')
      .on(table.detectionId, table.doubt)
      .where(sql`withdrawn_at is null`),
  ],
);

/**
 * Which source of a new version of a table is the one that people's words were given on. `open` ones could not be told and
 * are asked.
 */
export const bindings = pgTable(
  'bindings',
  {
    id: id(),
    surveyId: uuid('survey_id')
      .notNull()
      .references(() => surveys.id),
    /** The new version. */
    catalogueId: uuid('catalogue_id')
      .notNull()
      .references(() => catalogues.id, { onDelete: 'cascade' }),
    /** `detection`: all words on it; `object`: one override. */
    kind: text('kind').notNull(),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id, { onDelete: 'cascade' }),
    overrideId: uuid('override_id').references(() => overrides.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    /** `sure`, `open`, `answered` or `dropped`. */
    state: text('state').notNull(),
    /** [{row, name, separationArcsec}]. */
    candidates: jsonb('candidates').notNull(),
    row: integer('row'),
    /** The detection of the new version, where the kind is `detection`. */
    successorId: uuid('successor_id').references(() => detections.id, { onDelete: 'cascade' }),
    answeredBy: uuid('answered_by').references(() => users.id),
    note: text('note').notNull().default(''),
    createdAt: createdAt(),
  },
  (table) => [
    index('bindings_survey').on(table.surveyId, table.state),
    index('bindings_successor').on(table.successorId),
  ],
);

export const assignments = pgTable(
  'assignments',
  {
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id, { onDelete: 'cascade' }),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id),
    createdAt: createdAt(),
  },
  (table) => [primaryKey({ columns: [table.detectionId, table.userId] })],
);
