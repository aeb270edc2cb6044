import { z } from 'zod';

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
