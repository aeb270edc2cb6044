import type { Job } from '@eremite/shared/contracts/job';
import type { Response } from 'express';
import type { SignedInUser } from '../common/signed-in-user.ts';
import type { JobsService } from './jobs.service.ts';

/** Looks again this often, for jobs another process has in hand; also keeps proxies from closing the stream. */
const LOOK_MS = 2000;

/** The job as server-sent events: one `job` event for every change until it ends or the reader leaves. */
export async function streamJob(jobs: JobsService, user: SignedInUser, id: string, response: Response): Promise<void> {
  // Asked for before the headers go out, so that a refusal is an ordinary error answer.
  let job: Job = await jobs.get(user, id);
  response.writeHead(200, {
    'Content-Type': 'text/event-stream; charset=utf-8',
    'Cache-Control': 'no-store',
    'X-Accel-Buffering': 'no',
  });
  let open = true;
  response.on('close', () => (open = false));
  let sent = '';
  while (open) {
    const text = JSON.stringify(job);
    response.write(text === sent ? ':\n\n' : `event: job\ndata: ${text}\n\n`);
    sent = text;
    if (job.finishedAt) break;
    await nextLook(jobs, id, response);
    try {
      job = await jobs.get(user, id);
    } catch {
      // No longer theirs to see, or the service is stopping.
      break;
    }
  }
  response.end();
}

function nextLook(jobs: JobsService, id: string, response: Response): Promise<void> {
  return new Promise((resolve) => {
    const done = () => {
      clearTimeout(timer);
      stop();
      response.off('close', done);
      resolve();
    };
    const stop = jobs.onChange(id, done);
    const timer = setTimeout(done, LOOK_MS);
    response.once('close', done);
  });
}
