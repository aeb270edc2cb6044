import { Worker } from 'node:worker_threads';
import type { ReplayResult } from '@eremite/shared/contracts/edition';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { workerUrl } from '../../common/worker-url.ts';
import type { ReplayMessage } from '../../edition/archive/replay.worker.ts';
import type { JobContext, JobHandler } from '../../jobs/job-handler.ts';
import { FilesService } from '../files/files.service.ts';
import { EditionsRepository } from './editions.repository.ts';

export const REPLAY_EDITION = 'replay';

/** Repeats an edition from its archive in a thread; changes nothing, so an interrupted job simply starts again. */
@Injectable()
export class ReplayEditionJob implements JobHandler<{ editionId: string }, ReplayResult> {
  readonly kind = REPLAY_EDITION;

  constructor(
    private readonly editions: EditionsRepository,
    private readonly files: FilesService,
  ) {}

  async run({ editionId }: { editionId: string }, { signal, progress }: JobContext): Promise<ReplayResult> {
    const edition = await this.editions.find(editionId);
    if (!edition?.fileKey) throw new AppError('NOT_READY', 'The edition has no archive to be repeated from.');
    signal.throwIfAborted();
    const worker = new Worker(workerUrl('replay'), { workerData: { path: this.files.path(edition.fileKey) } });
    let onAbort!: () => void;
    return new Promise<ReplayResult>((resolve, reject) => {
      onAbort = () => reject(signal.reason as Error);
      signal.addEventListener('abort', onAbort, { once: true });
      worker.on('message', (message: ReplayMessage) => {
        if (message.kind === 'progress') progress(message.fraction, message.message);
        else if (message.kind === 'done') resolve(message.result);
        else reject(new AppError('ARCHIVE_CHANGED', message.message));
      });
      worker.once('error', reject);
      worker.once('exit', (code) => reject(new Error(`the replay thread ended early (code ${code})`)));
    }).finally(async () => {
      signal.removeEventListener('abort', onAbort);
      await worker.terminate();
    });
  }

  async recover(): Promise<void> {
    // The thread died with its process; its folder is the system's to sweep.
  }
}
