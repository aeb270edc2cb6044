import { z } from 'zod';
import { job } from './job.ts';

/** An account as an administrator sees it. */
export const account = z.object({
  id: z.uuid(),
  email: z.string(),
  name: z.string(),
  isAdministrator: z.boolean(),
  disabled: z.boolean(),
  teams: z.int(),
  createdAt: z.iso.datetime(),
});
export type Account = z.output<typeof account>;

export const updateAccountRequest = z.strictObject({ disabled: z.boolean() });
export type UpdateAccountRequest = z.output<typeof updateAccountRequest>;

/** A job without what it is about: an administrator has no sight of a team's data. */
export const adminJob = job
  .omit({ result: true, error: true, message: true })
  .extend({ attempts: z.int(), createdAt: z.iso.datetime() });

export const storage = z.object({
  database: z.object({ kind: z.enum(['built-in', 'postgresql']), bytes: z.int() }),
  files: z.object({ files: z.int(), bytes: z.int() }),
  catalogues: z.int(),
  catalogueRows: z.int(),
  tiles: z.object({ bytes: z.int() }),
});
export type Storage = z.output<typeof storage>;
