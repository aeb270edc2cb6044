import { index, integer, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id } from '../columns.ts';
import { teams, users } from './people.ts';
import { detections } from './surveys.ts';

/** Something said of a detection without deciding; those mentioned are written to. */
export const remarks = pgTable(
  'remarks',
  {
    id: id(),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id, { onDelete: 'cascade' }),
    authorId: uuid('author_id')
      .notNull()
      .references(() => users.id),
    text: text('text').notNull(),
    /** Ids of accounts. */
    mentions: jsonb('mentions').notNull().default([]),
    createdAt: createdAt(),
  },
  (table) => [index('remarks_detection').on(table.detectionId)],
);

/** A file that goes with a note; without a subject until the decision is sent. */
export const attachments = pgTable(
  'attachments',
  {
    id: id(),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id, { onDelete: 'cascade' }),
    /** The review, settlement, override, doubt word or remark whose note it goes with. */
    subjectId: uuid('subject_id'),
    uploadedBy: uuid('uploaded_by')
      .notNull()
      .references(() => users.id),
    fileName: text('file_name').notNull(),
    mediaType: text('media_type').notNull(),
    bytes: integer('bytes').notNull(),
    sha256: text('sha256').notNull(),
    fileKey: text('file_key').notNull(),
    createdAt: createdAt(),
  },
  (table) => [index('attachments_detection').on(table.detectionId), index('attachments_subject').on(table.subjectId)],
);

/** Phrases a team keeps at hand for its notes. */
export const notePhrases = pgTable('note_phrases', {
  teamId: uuid('team_id')
    .primaryKey()
    .references(() => teams.id, { onDelete: 'cascade' }),
  phrases: jsonb('phrases').notNull(),
});
