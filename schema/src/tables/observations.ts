import { index, integer, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id } from '../columns.ts';
import { users } from './people.ts';
import { detections } from './surveys.ts';

/** Images and spectra of detections; the files lie in the file store. */
export const observations = pgTable(
  'observations',
  {
    id: id(),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id, { onDelete: 'cascade' }),
    /** `image` or `spectrum`. */
    kind: text('kind').notNull(),
    label: text('label').notNull(),
    fileName: text('file_name').notNull(),
    bytes: integer('bytes').notNull(),
    sha256: text('sha256').notNull(),
    fileKey: text('file_key').notNull(),
    /** What was read of the file: the header of an image, the measured line of a spectrum. */
    facts: jsonb('facts').notNull(),
    /** Channels of a spectrum. */
    channels: jsonb('channels'),
    uploadedBy: uuid('uploaded_by')
      .notNull()
      .references(() => users.id),
    createdAt: createdAt(),
  },
  (table) => [index('observations_detection').on(table.detectionId)],
);
