import {
  bigint,
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
import { teams, users } from './people.ts';

export const surveys = pgTable('surveys', {
  id: id(),
  teamId: uuid('team_id')
    .notNull()
    .references(() => teams.id),
  name: text('name').notNull(),
  description: text('description').notNull().default(''),
  h0: doublePrecision('h0').notNull(),
  omegaM: doublePrecision('omega_m').notNull(),
  deletedAt: at('deleted_at'),
  createdAt: createdAt(),
});

/** An uploaded file and what is known of it, until it is published or discarded. */
export const intakes = pgTable(
  'intakes',
  {
    id: id(),
    surveyId: uuid('survey_id')
      .notNull()
      .references(() => surveys.id),
    createdBy: uuid('created_by')
      .notNull()
      .references(() => users.id),
    fileName: text('file_name').notNull(),
    /** Key in the file store. */
    fileKey: text('file_key').notNull(),
    bytes: bigint('bytes', { mode: 'number' }).notNull(),
    sha256: text('sha256').notNull(),
    /** Files that came with it, [{role: 'readMe' | 'part', fileName, key, bytes, sha256}]: its ReadMe, further parts of it. */
    companions: jsonb('companions').notNull().default([]),
    state: text('state').notNull().default('staged'),
    format: text('format').notNull(),
    /** Facts of every table of the file, as the reader gave them. */
    tables: jsonb('tables').notNull(),
    /** Columns of the chosen table with the guesses of their roles. */
    columns: jsonb('columns').notNull(),
    preview: jsonb('preview').notNull(),
    rows: integer('rows').notNull(),
    settings: jsonb('settings').notNull(),
    check: jsonb('check').notNull(),
    warnings: jsonb('warnings').notNull().default([]),
    /** Of the column names in order: finds the settings of an earlier table of the same shape. */
    headerHash: text('header_hash').notNull(),
    catalogueId: uuid('catalogue_id'),
    createdAt: createdAt(),
  },
  (table) => [index('intakes_survey').on(table.surveyId)],
);

/** A published table: immutable. `publishing` ones are invisible and swept at start. */
export const catalogues = pgTable(
  'catalogues',
  {
    id: id(),
    surveyId: uuid('survey_id')
      .notNull()
      .references(() => surveys.id),
    intakeId: uuid('intake_id').references(() => intakes.id),
    name: text('name').notNull(),
    kind: text('kind').notNull(),
    state: text('state').notNull(),
    fileName: text('file_name').notNull(),
    sha256: text('sha256').notNull(),
    /** Of a catalogue of several files: [{fileName, sha256, firstRow, rows}]. */
    parts: jsonb('parts').notNull().default([]),
    /** sha256 over file hashes and settings: what a run cites. */
    contentHash: text('content_hash').notNull(),
    rows: integer('rows').notNull().default(0),
    sidelined: integer('sidelined').notNull().default(0),
    withVelocity: integer('with_velocity').notNull().default(0),
    settings: jsonb('settings').notNull(),
    columns: jsonb('columns').notNull(),
    bands: jsonb('bands').notNull(),
    /** Sentences: what was assumed because the settings do not say. */
    assumed: jsonb('assumed').notNull().default([]),
    /** {type, order, moc, areaSqDeg, note}. */
    coverage: jsonb('coverage').notNull(),
    reference: text('reference').notNull().default(''),
    createdBy: uuid('created_by').references(() => users.id),
    publishedAt: at('published_at'),
    createdAt: createdAt(),
  },
  (table) => [index('catalogues_survey').on(table.surveyId)],
);

/** The rows of a catalogue in one sky cell; see service/src/tiles. */
export const tiles = pgTable(
  'tiles',
  {
    catalogueId: uuid('catalogue_id')
      .notNull()
      .references(() => catalogues.id, { onDelete: 'cascade' }),
    /** HEALPix nested cell at the store's order. */
    cell: integer('cell').notNull(),
    /** A cell with very many rows is cut into parts. */
    part: integer('part').notNull(),
    count: integer('count').notNull(),
    /** Packed role columns: what matching and scoring read. */
    roles: bytea('roles').notNull(),
    /** Packed original cells, in the catalogue's column order. */
    originals: bytea('originals').notNull(),
  },
  (table) => [primaryKey({ columns: [table.catalogueId, table.cell, table.part] })],
);

/** Rows that could not be used, in file order. */
export const sidelinedRows = pgTable(
  'sidelined_rows',
  {
    catalogueId: uuid('catalogue_id')
      .notNull()
      .references(() => catalogues.id, { onDelete: 'cascade' }),
    row: integer('row').notNull(),
    line: integer('line'),
    column: text('column'),
    value: text('value'),
    reason: text('reason').notNull(),
    /** The original cells, JSON array of text. */
    cells: text('cells').notNull(),
  },
  (table) => [primaryKey({ columns: [table.catalogueId, table.row] })],
);

export const detections = pgTable(
  'detections',
  {
    id: id(),
    surveyId: uuid('survey_id')
      .notNull()
      .references(() => surveys.id),
    catalogueId: uuid('catalogue_id')
      .notNull()
      .references(() => catalogues.id, { onDelete: 'cascade' }),
    row: integer('row').notNull(),
    name: text('name').notNull(),
    raDeg: doublePrecision('ra_deg').notNull(),
    decDeg: doublePrecision('dec_deg').notNull(),
    /** Optical, barycentric. */
    velocityKms: doublePrecision('velocity_kms'),
    width50Kms: doublePrecision('width50_kms'),
    fluxJyKms: doublePrecision('flux_jy_kms'),
    signalToNoise: doublePrecision('signal_to_noise'),
    reliability: doublePrecision('reliability'),
    distanceMpc: doublePrecision('distance_mpc'),
    distanceErrorMpc: doublePrecision('distance_error_mpc'),
  },
  (table) => [
    index('detections_survey').on(table.surveyId),
    uniqueIndex('detections_row').on(table.catalogueId, table.row),
  ],
);

/** A distance given by a person in place of the table's; the newest one not withdrawn holds. */
export const detectionDistances = pgTable(
  'detection_distances',
  {
    id: id(),
    detectionId: uuid('detection_id')
      .notNull()
      .references(() => detections.id, { onDelete: 'cascade' }),
    distanceMpc: doublePrecision('distance_mpc').notNull(),
    errorMpc: doublePrecision('error_mpc'),
    source: text('source').notNull(),
    note: text('note').notNull(),
    createdBy: uuid('created_by')
      .notNull()
      .references(() => users.id),
    withdrawnAt: at('withdrawn_at'),
    createdAt: createdAt(),
  },
  (table) => [index('detection_distances_detection').on(table.detectionId)],
);
