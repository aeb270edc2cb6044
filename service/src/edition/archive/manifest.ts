import { criteriaSettings } from '@eremite/shared/contracts/criteria';
import { intakeSettings } from '@eremite/shared/contracts/intake-settings';
import { z } from 'zod';
import type { EditionHead } from '../edition-head.ts';

/** Name of the manifest in the archive. */
export const MANIFEST = 'edition.json';
/** What the run found of every detection, one JSON line each, in input order. */
export const RESULTS = 'results/verdicts.jsonl';
export const FORMAT_VERSION = 1;

/** A file of the archive. */
export interface ArchivedFile {
  path: string;
  bytes: number;
  /** Hex. */
  sha256: string;
}

/** Files of one input: the table itself first, then its ReadMe and further parts. */
export interface InputFile {
  role: 'table' | 'readMe' | 'part';
  path: string;
}

/** The manifest: what the edition says of itself, and every other file of the archive with its hash. */
export interface Manifest extends EditionHead {
  format: 'eremite edition';
  formatVersion: number;
  inputs: (EditionHead['inputs'][number] & { files: InputFile[] })[];
  files: ArchivedFile[];
}

const inputFile = z.object({ role: z.enum(['table', 'readMe', 'part']), path: z.string() });

/** As much of a manifest as repeating it needs; the rest is for people. */
export const manifestSchema = z.looseObject({
  format: z.literal('eremite edition'),
  formatVersion: z.literal(FORMAT_VERSION, { error: 'this version of Eremite reads edition archives of format 1' }),
  number: z.int(),
  survey: z.looseObject({ name: z.string(), cosmology: z.object({ h0: z.number(), omegaM: z.number() }) }),
  criteria: z.looseObject({ settings: criteriaSettings }),
  run: z.looseObject({ number: z.int(), detections: z.int(), scoringVersion: z.string() }),
  decisions: z.object({ overrides: z.array(z.any()), distances: z.array(z.any()) }),
  inputs: z.array(
    z.looseObject({
      catalogueId: z.string(),
      name: z.string(),
      contentHash: z.string(),
      settings: intakeSettings,
      files: z.array(inputFile).min(1),
    }),
  ),
  files: z.array(z.object({ path: z.string(), bytes: z.int(), sha256: z.string() })),
});
export type ReadManifest = z.output<typeof manifestSchema>;

/** One line of {@link RESULTS}. Hashes stand for the packed candidates and neighbours. */
export interface ResultLine {
  catalogueId: string;
  row: number;
  item: Record<string, unknown>;
  detail: Record<string, unknown>;
  candidatesSha256: string;
  neighboursSha256: string;
}
