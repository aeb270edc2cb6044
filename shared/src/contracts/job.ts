import { z } from 'zod';

export const JOB_STATES = ['queued', 'running', 'done', 'failed', 'cancelled'] as const;
export const job = z.object({
  id: z.uuid(),
  kind: z.string(),
  state: z.enum(JOB_STATES),
  /** Share of the work done, 0 to 1. */
  progress: z.number().min(0).max(1),
  message: z.string(),
  startedAt: z.iso.datetime().nullable(),
  finishedAt: z.iso.datetime().nullable(),
  /** Seconds left by the pace so far; null while nothing can be said. */
  secondsLeft: z.number().nullable(),
  result: z.unknown().optional(),
  error: z.object({ title: z.string(), detail: z.string().optional() }).optional(),
});
export type Job = z.output<typeof job>;
export const jobAccepted = z.object({ jobId: z.uuid() });
