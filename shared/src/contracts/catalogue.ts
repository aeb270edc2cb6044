import { z } from 'zod';
import { bandCounts } from './band-counts.ts';
import { coverage } from './coverage.ts';
import { bandFacts, intakeSettings } from './intake-settings.ts';
import { intakeColumn } from './intake.ts';
import { listQuery, rowNumber } from './list.ts';
import { CATALOGUE_KINDS } from './words.ts';

/** A published table and what is known of it. */
export const catalogue = z.object({
  id: z.uuid(),
  surveyId: z.uuid(),
  name: z.string(),
  kind: z.enum(CATALOGUE_KINDS),
  /** `superseded`: kept for the runs that read it, used by no further one. */
  state: z.enum(['publishing', 'published', 'superseded', 'removed']),
  fileName: z.string(),
  sha256: z.string(),
  /** Files of a catalogue of several; rows are numbered on from file to file. */
  parts: z.array(z.object({ fileName: z.string(), sha256: z.string(), firstRow: z.int(), rows: z.int() })),
  rows: z.int(),
  sidelined: z.int(),
  withVelocity: z.int(),
  bands: z.array(bandFacts),
  columns: z.array(intakeColumn),
  settings: intakeSettings,
  assumed: z.array(z.string()),
  coverage,
  reference: z.string(),
  publishedAt: z.iso.datetime().nullable(),
  usedByRuns: z.int(),
});
export type Catalogue = z.output<typeof catalogue>;

/** Rows near a place, or in file order where no place is given. */
export const catalogueRowsQuery = listQuery.extend({
  raDeg: z.coerce.number().optional(),
  decDeg: z.coerce.number().min(-90).max(90).optional(),
  radiusArcsec: z.coerce.number().positive().max(36_000).optional(),
  /** In place of a radius: so many rows nearest to the place, however far. */
  nearest: z.coerce.number().int().min(1).max(100).optional(),
  row: z.coerce.number().pipe(rowNumber).optional(),
});
export const catalogueRow = z.object({
  row: z.int(),
  raDeg: z.number(),
  decDeg: z.number(),
  separationArcsec: z.number().nullable(),
  /** Every original cell as text, in the catalogue's column order. */
  cells: z.array(z.string()),
});

/** Counts of magnitudes by band. */
export const catalogueMagnitudes = z.object({ bands: z.array(bandCounts) });
export type CatalogueMagnitudes = z.output<typeof catalogueMagnitudes>;
