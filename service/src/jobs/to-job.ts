import type { Job } from '@eremite/shared/contracts/job';
import type { JobRow } from './jobs.repository.ts';

/** The contract's view of a job, with the time left by the pace so far. */
export function toJob(row: JobRow, now = Date.now()): Job {
  const elapsed = row.startedAt ? (now - row.startedAt.getTime()) / 1000 : 0;
  const tells = row.state === 'running' && row.progress > 0.01 && elapsed > 1;
  return {
    id: row.id,
    kind: row.kind,
    state: row.state as Job['state'],
    progress: row.progress,
    message: row.message,
    startedAt: row.startedAt?.toISOString() ?? null,
    finishedAt: row.finishedAt?.toISOString() ?? null,
    secondsLeft: tells ? Math.round((elapsed * (1 - row.progress)) / row.progress) : null,
    ...(row.result != null && { result: row.result }),
    ...(row.error != null && { error: row.error as NonNullable<Job['error']> }),
  };
}
