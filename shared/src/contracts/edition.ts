import { z } from 'zod';
import { cosmology } from './survey.ts';
import { REVIEW_OUTCOMES } from './review.ts';
import { verdictItem } from './verdict.ts';
import { STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS } from './words.ts';

/** What an edition can be taken away as; `archive` is the whole of it, with its inputs. */
export const EDITION_FORMATS = [
  'csv',
  'votable',
  'fits',
  'mrt',
  'latex',
  'json',
  'targets',
  'dossier',
  'bib',
  'methods',
  'archive',
] as const;
export type EditionFormat = (typeof EDITION_FORMATS)[number];

/** Tables of an edition; `targets`, `dossier`, `bib`, `methods` and `archive` are of the whole. */
export const EDITION_TABLES = [
  'shortlist',
  'limits',
  'candidates',
  'neighbours',
  'doubts',
  'grounds',
  'overrides',
  'reviews',
] as const;
export type EditionTable = (typeof EDITION_TABLES)[number];

export const exportQuery = z.object({
  table: z.enum(EDITION_TABLES).default('shortlist'),
  /** CSV: the units as a second row. */
  units: z.enum(['yes', 'no']).default('no'),
  /** VOTable. */
  version: z.enum(['1.5', '1.4']).default('1.5'),
});
export type ExportQuery = z.output<typeof exportQuery>;

export const editionReview = z.object({
  as: z.enum(['settled', 'review']),
  runNumber: z.int(),
  outcome: z.enum(REVIEW_OUTCOMES),
  starlight: z.enum(STARLIGHT_VERDICTS),
  surroundings: z.enum(SURROUNDINGS_VERDICTS),
  note: z.string(),
  by: z.string(),
  at: z.iso.datetime(),
});
export type EditionReview = z.output<typeof editionReview>;

export const editionOverride = z.object({
  catalogueId: z.uuid(),
  catalogueName: z.string(),
  rowId: z.int(),
  objectName: z.string(),
  action: z.enum(['accept', 'reject']),
  note: z.string(),
  by: z.string(),
  at: z.iso.datetime(),
  withdrawnAt: z.iso.datetime().nullable(),
  withdrawnNote: z.string().nullable(),
});
export type EditionOverride = z.output<typeof editionOverride>;

/** A word on a doubt: cleared by what the catalogues cannot know, or confirmed. */
export const editionDoubtWord = z.object({
  doubt: z.string(),
  word: z.string(),
  note: z.string(),
  by: z.string(),
  at: z.iso.datetime(),
});

const named = z.object({ id: z.uuid(), number: z.int() });

export const editionInput = z.object({
  catalogueId: z.uuid(),
  name: z.string(),
  kind: z.string(),
  fileName: z.string(),
  rows: z.int(),
  /** Of the file as uploaded. */
  sha256: z.string(),
  /** Of the file together with how it was read: what the run cites. */
  contentHash: z.string(),
  reference: z.string(),
});

export const edition = z.object({
  id: z.uuid(),
  surveyId: z.uuid(),
  surveyName: z.string(),
  number: z.int(),
  state: z.enum(['packing', 'frozen', 'failed']),
  error: z.string().nullable(),
  note: z.string(),
  run: named,
  criteria: named,
  entries: z.int(),
  createdBy: z.string(),
  createdAt: z.iso.datetime(),
  supersedes: named.nullable(),
  supersededBy: named.nullable(),
  archive: z.object({ bytes: z.int(), sha256: z.string() }).nullable(),
  jobId: z.uuid().nullable(),
});
export type Edition = z.output<typeof edition>;

export const editionEntry = z.object({
  rank: z.int(),
  detectionId: z.uuid(),
  reason: z.string(),
  nullResult: z.string(),
  priority: z.number(),
  verdict: verdictItem,
  said: z.array(editionReview),
  overrides: z.array(editionOverride),
  doubtWords: z.array(editionDoubtWord),
});
export type EditionEntry = z.output<typeof editionEntry>;

/** Everything of an edition but what is behind each verdict. */
export const editionDetail = edition.extend({
  description: z.string(),
  cosmology,
  inputHash: z.string(),
  scoringVersion: z.string(),
  softwareVersion: z.string(),
  inputs: z.array(editionInput),
  ledgerHead: z.object({ number: z.int(), hash: z.string() }),
  methods: z.string(),
  list: z.array(editionEntry),
});
export type EditionDetail = z.output<typeof editionDetail>;

export const createEditionRequest = z.strictObject({
  note: z.string().trim().min(1, 'say what this edition is for').max(4000),
  /** ETag of the shortlist last seen may also be sent in If-Match. */
});
export type CreateEditionRequest = z.output<typeof createEditionRequest>;

/** What one edition has that another has not. */
export const editionDifference = z.object({
  from: named,
  to: named,
  runChanged: z.object({ from: z.int(), to: z.int() }).nullable(),
  criteriaChanged: z.array(z.object({ key: z.string(), from: z.unknown(), to: z.unknown() })),
  inputsChanged: z.array(z.string()),
  added: z.array(z.object({ name: z.string(), rank: z.int() })),
  removed: z.array(z.object({ name: z.string(), rank: z.int() })),
  changed: z.array(z.object({ name: z.string(), what: z.array(z.string()) })),
  unchanged: z.int(),
});
export type EditionDifference = z.output<typeof editionDifference>;

/** What came of repeating an edition from its inputs. */
export const replayResult = z.object({
  identical: z.boolean(),
  detections: z.int(),
  sentence: z.string(),
  differences: z.array(z.string()),
});
export type ReplayResult = z.output<typeof replayResult>;

export const createGuestLinkRequest = z.strictObject({
  label: z.string().trim().min(1, 'say for whom the link is').max(200),
  expiresInDays: z.int().min(1).max(366).default(30),
});
export type CreateGuestLinkRequest = z.output<typeof createGuestLinkRequest>;
export const guestLink = z.object({
  id: z.uuid(),
  label: z.string(),
  createdBy: z.string(),
  createdAt: z.iso.datetime(),
  expiresAt: z.iso.datetime(),
  revokedAt: z.iso.datetime().nullable(),
  lastUsedAt: z.iso.datetime().nullable(),
});
export type GuestLink = z.output<typeof guestLink>;
/** The address is shown once: only its hash is kept. */
export const createdGuestLink = guestLink.extend({ token: z.string(), url: z.string() });

/** What the holder of a link sees. */
export const sharedEdition = z.object({ edition: editionDetail, expiresAt: z.iso.datetime() });
