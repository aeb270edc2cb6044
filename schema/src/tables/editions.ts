import { bigint, index, integer, jsonb, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { at, createdAt, id } from '../columns.ts';
import { users } from './people.ts';
import { runs } from './runs.ts';
import { detections, surveys } from './surveys.ts';

/** A frozen, numbered shortlist. Nothing of it changes once its archive is packed; a new edition supersedes it. */
export const editions = pgTable(
  'editions',
  {
    id: id(),
    surveyId: uuid('survey_id')
      .notNull()
      .references(() => surveys.id),
    number: integer('number').notNull(),
    runId: uuid('run_id')
      .notNull()
      .references(() => runs.id),
    /** `packing`, `frozen`, or `failed` with the reason in `error`. */
    state: text('state').notNull().default('packing'),
    error: text('error'),
    note: text('note').notNull(),
    /** Survey, criteria, run, inputs, ledger head and versions as they stood: service/src/edition/edition-head.ts. */
    head: jsonb('head').notNull(),
    supersedesId: uuid('supersedes_id'),
    jobId: uuid('job_id'),
    /** Key of the archive in the file store. */
    fileKey: text('file_key'),
    bytes: bigint('bytes', { mode: 'number' }),
    sha256: text('sha256'),
    createdBy: uuid('created_by')
      .notNull()
      .references(() => users.id),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex('editions_number').on(table.surveyId, table.number)],
);

/** One detection of an edition: what people said of it, frozen. What the run found is read from the run, which never changes. */
export const editionEntries = pgTable(
  'edition_entries',
  {
    editionId: uuid('edition_id')
      .notNull()
      .references(() => editions.id, { onDelete: 'cascade' }),
    rank: integer('rank').notNull(),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id),
    /** service/src/edition/edition-words.ts. */
    words: jsonb('words').notNull(),
  },
  (table) => [primaryKey({ columns: [table.editionId, table.rank] })],
);

/** A link by which someone without an account reads one edition. */
export const guestLinks = pgTable(
  'guest_links',
  {
    id: id(),
    editionId: uuid('edition_id')
      .notNull()
      .references(() => editions.id, { onDelete: 'cascade' }),
    /** For whom: shown to the team only. */
    label: text('label').notNull(),
    tokenHash: text('token_hash').notNull().unique(),
    createdBy: uuid('created_by')
      .notNull()
      .references(() => users.id),
    expiresAt: at('expires_at').notNull(),
    revokedAt: at('revoked_at'),
    lastUsedAt: at('last_used_at'),
    createdAt: createdAt(),
  },
  (table) => [index('guest_links_edition').on(table.editionId)],
);
