import { z } from 'zod';
import { listQuery } from './list.ts';

/** One line of the append-only history; `hash` covers the line and the hash before it. */
export const ledgerEntry = z.object({
  number: z.int(),
  at: z.iso.datetime(),
  actor: z.string(),
  action: z.string(),
  subject: z.string(),
  note: z.string(),
  detail: z.record(z.string(), z.unknown()),
  hash: z.string(),
});
export type LedgerEntry = z.output<typeof ledgerEntry>;

/** What lines are narrowed by. Text is looked for in subject and note; days are inclusive, UTC. */
const filter = {
  actor: z.string().max(200).optional(),
  action: z.string().max(100).optional(),
  search: z.string().max(200).optional(),
  detectionId: z.uuid().optional(),
  since: z.iso.date().optional(),
  until: z.iso.date().optional(),
};
export const ledgerQuery = listQuery.extend(filter);
export type LedgerQuery = z.output<typeof ledgerQuery>;

/**
 * `csv` for reading; `jsonl` with all that the hashes cover, so that the chain can be checked by anyone: sha256 over the JSON
 * array [previousHash, surveyId, number, at, actorId, actor, action, subject, note, detail] with sorted keys.
 */
export const ledgerExportQuery = z.object({ ...filter, format: z.enum(['csv', 'jsonl']).default('csv') });
export type LedgerExportQuery = z.output<typeof ledgerExportQuery>;

/** Words to choose filters from. */
export const ledgerFacets = z.object({ actors: z.array(z.string()), actions: z.array(z.string()) });

export const ledgerVerification = z.object({
  entries: z.int(),
  intact: z.boolean(),
  brokenAt: z.int().nullable(),
  /** Hash of the last line: write it down elsewhere, and the whole history up to it is fixed. */
  lastHash: z.string(),
});
