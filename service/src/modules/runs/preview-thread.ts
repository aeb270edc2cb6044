import { Worker } from 'node:worker_threads';
import type { WhatIf } from '@eremite/shared/contracts/what-if';
import { Injectable, type OnModuleDestroy } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { workerUrl } from '../../common/worker-url.ts';
import type { PreviewedDetection, PreviewMessage, PreviewTask, SupposeTask } from './preview-messages.ts';
import { errorOf } from './thread-failure.ts';

type Supposed = Pick<WhatIf, 'points' | 'neighbours'>;

/** A preview is for looking at once; what takes longer is a run's work. */
const LONGEST_MS = 30_000;

/** One thread for previews, kept between them since starting one takes longer than a preview. They take turns. */
@Injectable()
export class PreviewThread implements OnModuleDestroy {
  #worker: Worker | undefined;
  #last: Promise<unknown> = Promise.resolve();

  /** @throws {AppError} RUN_FAILED; SELECTS_EVERYTHING when it takes too long */
  score(task: PreviewTask): Promise<PreviewedDetection[]> {
    return this.#inTurn(task);
  }

  /** The same for one detection at other distances. */
  suppose(task: SupposeTask): Promise<Supposed> {
    return this.#inTurn(task);
  }

  #inTurn<T>(task: PreviewTask | SupposeTask): Promise<T> {
    const turn = this.#last.then(() => this.#ask<T>(task));
    this.#last = turn.catch(() => undefined);
    return turn;
  }

  async onModuleDestroy(): Promise<void> {
    await this.#worker?.terminate();
  }

  #ask<T>(task: PreviewTask | SupposeTask): Promise<T> {
    const worker = (this.#worker ??= this.#start());
    worker.ref();
    return new Promise<T>((resolve, reject) => {
      const drop = (error: AppError) => {
        this.#worker = undefined;
        void worker.terminate();
        reject(error);
      };
      const slow = 'The preview takes too long; choose fewer detections or narrower criteria.';
      const timer = setTimeout(() => drop(new AppError('SELECTS_EVERYTHING', slow)), LONGEST_MS);
      const onMessage = (message: PreviewMessage) => {
        if (message.kind === 'failed') reject(errorOf(message));
        else resolve(JSON.parse(message.results) as T);
        end();
      };
      const onError = (error: Error) => {
        drop(errorOf({ message: error.message, cause: 'inside' }));
        end();
      };
      const end = () => {
        clearTimeout(timer);
        worker.off('message', onMessage).off('error', onError).unref();
      };
      worker.once('message', onMessage).once('error', onError);
      worker.postMessage(task);
    });
  }

  #start(): Worker {
    const worker = new Worker(workerUrl('preview'));
    worker.once('exit', () => {
      if (this.#worker === worker) this.#worker = undefined;
    });
    // Without a listener an error in an idle thread would end the process.
    return worker.on('error', () => undefined);
  }
}
