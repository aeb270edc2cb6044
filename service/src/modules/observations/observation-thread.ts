import { Worker } from 'node:worker_threads';
import { Injectable, type OnModuleDestroy } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { workerUrl } from '../../common/worker-url.ts';
import type { ObservationAnswers, ObservationMessage, ObservationTask } from './observation-task.ts';

/** Decoding the largest image allowed takes seconds; what takes longer hangs. */
const LONGEST_MS = 60_000;

/** One thread that decodes images and spectra, in turn, so that no file holds up the service or fills it twice. */
@Injectable()
export class ObservationThread implements OnModuleDestroy {
  #worker: Worker | undefined;
  #last: Promise<unknown> = Promise.resolve();

  /** @throws {AppError} OBSERVATION_UNREADABLE with what is wrong with the file, or that it takes too long */
  ask<T extends ObservationTask>(task: T): Promise<ObservationAnswers[T['what']]> {
    const turn = this.#last.then(() => this.#send(task));
    this.#last = turn.catch(() => undefined);
    return turn as Promise<ObservationAnswers[T['what']]>;
  }

  async onModuleDestroy(): Promise<void> {
    await this.#worker?.terminate();
  }

  #send(task: ObservationTask): Promise<unknown> {
    const worker = (this.#worker ??= this.#start());
    worker.ref();
    return new Promise((resolve, reject) => {
      const drop = (error: Error) => {
        this.#worker = undefined;
        void worker.terminate();
        reject(error);
        end();
      };
      const slow = 'Reading the file takes too long. Cut it down to the part about the detection.';
      const timer = setTimeout(() => drop(new AppError('OBSERVATION_UNREADABLE', slow)), LONGEST_MS);
      const onMessage = (message: ObservationMessage) => {
        if (message.kind === 'done') resolve(message.answer);
        else
          reject(message.told ? new AppError('OBSERVATION_UNREADABLE', message.message) : new Error(message.message));
        end();
      };
      const end = () => {
        clearTimeout(timer);
        worker.off('message', onMessage).off('error', drop).unref();
      };
      worker.once('message', onMessage).once('error', drop);
      worker.postMessage(task);
    });
  }

  #start(): Worker {
    const worker = new Worker(workerUrl('observation'));
    worker.once('exit', () => {
      if (this.#worker === worker) this.#worker = undefined;
    });
    // Without a listener an error in an idle thread would end the process.
    return worker.on('error', () => undefined);
  }
}
