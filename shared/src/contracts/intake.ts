import { z } from 'zod';
import { bandCounts } from './band-counts.ts';
import { coverage } from './coverage.ts';
import { duplicatePair } from './duplicate-pair.ts';
import { intakeSettings } from './intake-settings.ts';

export const intakeColumn = z.object({
  name: z.string(),
  unit: z.string().nullable(),
  ucd: z.string().nullable(),
  description: z.string().nullable(),
  type: z.enum(['number', 'integer', 'text', 'boolean']),
  /** Best guess of the role, or null. `magnitude:r` carries its band. */
  guess: z.string().nullable(),
  /** 0 to 1. */
  confidence: z.number().min(0).max(1),
});
export type IntakeColumn = z.output<typeof intakeColumn>;

export const sidelinedRow = z.object({
  row: z.int(),
  line: z.int().nullable(),
  column: z.string().nullable(),
  value: z.string().nullable(),
  reason: z.string(),
});
export type SidelinedRow = z.output<typeof sidelinedRow>;

/** A thing the settings leave open: `ask` must be answered before publishing, `assumed` states the default taken. */
export const settingsQuestion = z.object({
  level: z.enum(['ask', 'assumed', 'warning']),
  /** JSON pointer into the settings. */
  pointer: z.string(),
  text: z.string(),
});
export type SettingsQuestion = z.output<typeof settingsQuestion>;

/** What would become of the rows under the present settings; counted over the whole table. */
export const intakeCheck = z.object({
  rows: z.int(),
  usable: z.int(),
  sidelined: z.int(),
  /** Rows left out by `keep`: not at fault, not wanted. */
  leftOut: z.int(),
  reasons: z.array(z.object({ reason: z.string(), count: z.int(), first: z.array(sidelinedRow) })),
  questions: z.array(settingsQuestion),
  /** True when it can be published as it stands. */
  ready: z.boolean(),
});
export type IntakeCheck = z.output<typeof intakeCheck>;

export const tablePart = z.object({
  fileName: z.string(),
  bytes: z.int().nullable(),
  /** 1-based number of its first row. */
  firstRow: z.int(),
  rows: z.int(),
});

export const intake = z.object({
  id: z.uuid(),
  surveyId: z.uuid(),
  fileName: z.string(),
  bytes: z.int(),
  sha256: z.string(),
  /** The ReadMe that came with a journal's data file. */
  readMe: z.string().nullable(),
  /** Of a catalogue of several files, what each gives: rows are numbered on from file to file. */
  parts: z.array(tablePart),
  state: z.enum(['staged', 'publishing', 'published', 'discarded']),
  format: z.string(),
  tables: z.array(z.object({ index: z.int(), name: z.string(), rows: z.int().nullable(), columns: z.int() })),
  columns: z.array(intakeColumn),
  /** First rows as text, one array a row, in column order. */
  preview: z.array(z.array(z.string())),
  rows: z.int(),
  settings: intakeSettings,
  check: intakeCheck,
  /** Counts of the magnitudes of the usable rows, by band. */
  magnitudes: z.array(bandCounts),
  /** The region as the settings have it; its cells are coarsened where there are very many. Null before rows can be read. */
  coverage: coverage.nullable(),
  /** HI lists: rows that seem one source. `count` is of all, `pairs` holds the first of them. */
  duplicates: z.object({ count: z.int(), pairs: z.array(duplicatePair) }),
  warnings: z.array(z.string()),
  catalogueId: z.uuid().nullable(),
  createdAt: z.iso.datetime(),
});
export type Intake = z.output<typeof intake>;

export const updateIntakeRequest = z.strictObject({ settings: intakeSettings });
export const publishResult = z.object({ catalogueId: z.uuid(), rows: z.int(), sidelined: z.int() });
export type PublishResult = z.output<typeof publishResult>;
