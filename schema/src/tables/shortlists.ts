import { integer, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { at } from '../columns.ts';
import { runs } from './runs.ts';
import { detections, surveys } from './surveys.ts';

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
