import { z } from 'zod';
import { rowNumber } from './list.ts';
import { CATALOGUE_KINDS } from './words.ts';

/** Name of a column in the uploaded table; null says "none", absent says "guess". */
const columnName = z.string().min(1).max(500).nullable();

export const magnitudeColumn = z.strictObject({
  column: z.string().min(1).max(500),
  error: columnName.optional(),
  limitFlag: columnName.optional(),
  band: z.string().min(1).max(20),
});

/** Roles a single column can have; the order is that of the screens. */
export const COLUMN_ROLES = [
  'name',
  'ra',
  'dec',
  'positionError',
  'velocity',
  'velocityError',
  'redshift',
  'redshiftError',
  'frequency',
  'width50',
  'width20',
  'flux',
  'fluxError',
  'signalToNoise',
  'reliability',
  'distance',
  'distanceError',
  'magnitude',
  'effectiveRadius',
  'axisRatio',
  'positionAngle',
  'starGalaxy',
  'redshiftQuality',
  'reddening',
  'properMotion',
  'properMotionRa',
  'properMotionDec',
  'continuumFlux',
  'beamMajor',
  'beamMinor',
  'raHours',
  'raMinutes',
  'raSeconds',
  'decSign',
  'decDegrees',
  'decMinutes',
  'decSeconds',
  'memberCount',
  'velocityDispersion',
  'groupRadius',
  'groupMass',
] as const;
export type ColumnRole = (typeof COLUMN_ROLES)[number];

export const columnRoles = z.strictObject({
  ...(Object.fromEntries(COLUMN_ROLES.map((role) => [role, columnName.optional()])) as Record<
    ColumnRole,
    z.ZodOptional<typeof columnName>
  >),
  magnitudes: z.array(magnitudeColumn).max(60).optional(),
});

export const bandFacts = z.strictObject({
  name: z.string().min(1).max(20),
  system: z.enum(['AB', 'Vega']).optional(),
  /** 5-sigma point-source depth, mag in `system`; null or absent is "not stated". */
  depth5Sigma: z.number().min(-5).max(40).nullable().optional(),
  seeingFwhmArcsec: z.number().positive().max(600).nullable().optional(),
  extinction: z.enum(['none', 'column', 'already-corrected']).optional(),
});

export const FOOTPRINT_TYPES = ['unknown', 'rows', 'moc', 'circles', 'cones', 'polygons', 'all-sky'] as const;
/**
 * `moc`: text (ASCII or JSON), an object, or `{"fits": base64}` of a FITS file; `circles`:
 * [[raDeg, decDeg, radiusDeg]]; `polygons`: [[[raDeg, decDeg], ...]]; `cones`: {"radiusArcsec": 120}, for a table fetched
 * in cones around the survey's detections, or with the centres they had then as "centres": [[raDeg, decDeg]].
 */
export const footprint = z.strictObject({ type: z.enum(FOOTPRINT_TYPES), value: z.unknown().optional() });

/** How a table is read: the whole of what the wizard asks. All keys are optional but `kind`, `columns.ra` and `columns.dec`. */
export const intakeSettings = z.strictObject({
  table: z.int().min(0).optional(),
  kind: z.enum(CATALOGUE_KINDS).optional(),
  name: z.string().trim().max(200).optional(),
  columns: columnRoles.optional(),
  /** One magnitude without the lists: `columns.magnitude` with this band. */
  band: z.union([z.string().min(1).max(20), bandFacts]).optional(),
  /** Unit of a column by role, in place of the file's. */
  units: z.record(z.string(), z.string().max(60)).optional(),
  /** Frame of the positions. */
  frame: z.enum(['icrs', 'fk5', 'fk4', 'galactic']).optional(),
  velocity: z
    .strictObject({
      convention: z.enum(['optical', 'radio', 'relativistic']).optional(),
      frame: z.enum(['barycentric', 'lsrk', 'local-group', 'cmb']).optional(),
    })
    .optional(),
  errorMeaning: z.enum(['sigma1d', 'meanRadial', 'radial68', 'radial90', 'radial95']).optional(),
  positionErrorArcsec: z.number().positive().max(36_000).nullable().optional(),
  beamArcsec: z
    .strictObject({
      major: z.number().positive().max(36_000),
      minor: z.number().positive().max(36_000),
      angleDeg: z.number().optional(),
    })
    .nullable()
    .optional(),
  /** A `distance` column is used as given for projection unless it is said to be a luminosity distance. */
  distanceKind: z.enum(['angular', 'luminosity']).optional(),
  bands: z.array(bandFacts).max(60).optional(),
  /** Magnitude to which redshifts are complete (in the band named), for surroundings. */
  redshiftDepth: z.strictObject({ band: z.string(), magnitude: z.number() }).nullable().optional(),
  missing: z.array(z.string().max(60)).max(100).optional(),
  /** Keep only rows whose column holds one of these values, e.g. object type `G`. */
  keep: z
    .array(z.strictObject({ column: z.string(), values: z.array(z.string().max(200)).min(1).max(200) }))
    .max(10)
    .optional(),
  footprint: footprint.optional(),
  reference: z.string().max(2000).optional(),
  /** The file breaks off and the rows before the break are to be taken all the same. */
  acceptTruncated: z.boolean().optional(),
  /** HI lists: of one source detected twice keep the row of the higher signal-to-noise ratio. */
  mergeDuplicates: z.boolean().optional(),
  /** Where a catalogue comes in several files: rows of different files this near are one object; 0 keeps them all. */
  overlapArcsec: z.number().min(0).max(60).optional(),
  /** Rows of an HI list, by number, that are sources of their own though they look like duplicates. */
  keepApart: z.array(rowNumber).max(100_000).optional(),
  /** Catalogue of the same survey and kind whose new version this is; it is used by no further run. */
  supersedes: z.uuid().nullable().optional(),
});
export type IntakeSettings = z.output<typeof intakeSettings>;
export type BandFacts = z.output<typeof bandFacts>;
export type MagnitudeColumn = z.output<typeof magnitudeColumn>;
