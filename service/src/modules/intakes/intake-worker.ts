import { Worker } from 'node:worker_threads';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { workerUrl } from '../../common/worker-url.ts';
import type { Inspection } from '../../intake/inspect.ts';
import type { IntakeFailure, IntakeMessage, IntakeTask } from '../../intake/intake-messages.ts';
import type { Published, PublishSink } from '../../intake/publish.ts';

export interface PublishHooks extends PublishSink {
  progress(fraction: number, rows: number): void;
  signal: AbortSignal;
}
type Finished = { inspection?: Inspection; published?: Published };

/** Threads that read tables at once: more would only take turns on the cores and the memory of each adds up. */
const MOST_THREADS = 2;

/** Reads uploaded tables in threads of their own, and tells their failures as the errors of the interface. */
@Injectable()
export class IntakeWorker {
  private running = 0;
  private readonly waiting: (() => void)[] = [];

  /** @throws {AppError} TABLE_UNREADABLE */
  async inspect(file: Omit<IntakeTask, 'what'>): Promise<Inspection> {
    const { inspection } = await this.queued(() => run({ what: 'inspect', ...file }));
    return inspection!;
  }

  /** @throws {AppError} TABLE_UNREADABLE, SETTINGS_INCOMPLETE; and the signal's reason */
  async publish(file: Omit<IntakeTask, 'what'>, hooks: PublishHooks): Promise<Published> {
    const { published } = await this.queued(() => run({ what: 'publish', ...file }, hooks));
    return published!;
  }

  private async queued<T>(work: () => Promise<T>): Promise<T> {
    if (this.running >= MOST_THREADS) await new Promise<void>((resolve) => this.waiting.push(resolve));
    else this.running++;
    try {
      return await work();
    } finally {
      const next = this.waiting.shift();
      if (next) next();
      else this.running--;
    }
  }
}

function run(task: IntakeTask, hooks?: PublishHooks): Promise<Finished> {
  hooks?.signal.throwIfAborted();
  const worker = new Worker(workerUrl('intake'), { workerData: task });
  return new Promise<Finished>((resolve, reject) => {
    const onAbort = () => reject(hooks?.signal.reason as Error);
    hooks?.signal.addEventListener('abort', onAbort, { once: true });
    const take = async (message: IntakeMessage): Promise<void> => {
      if (message.kind === 'inspected') resolve({ inspection: message.inspection });
      else if (message.kind === 'published') resolve({ published: message.published });
      else if (message.kind === 'failed') reject(told(message.failure));
      else if (message.kind === 'progress') hooks?.progress(message.fraction, message.rows);
      else {
        await (message.kind === 'tiles' ? hooks?.tiles(message.tiles) : hooks?.sidelined(message.rows));
        worker.postMessage('taken');
      }
    };
    worker.on('message', (message: IntakeMessage) => void take(message).catch(reject));
    worker.once('error', reject);
    worker.once('exit', (code) => reject(new Error(`the thread reading the table ended early (code ${code})`)));
  }).finally(() => void worker.terminate());
}

function told(failure: IntakeFailure): Error {
  if (failure.kind === 'table') return new AppError('TABLE_UNREADABLE', placed(failure));
  if (failure.kind === 'settings') {
    return new AppError('SETTINGS_INCOMPLETE', failure.faults.map(({ detail }) => detail).join(' '), failure.faults);
  }
  const error = new Error(failure.message);
  if (failure.stack !== undefined) error.stack = failure.stack;
  return error;
}

/** What is wrong, where, and the mend, as one sentence after another. */
function placed({ message, mend, line, column, byte }: Extract<IntakeFailure, { kind: 'table' }>): string {
  const place = [
    line !== undefined && `line ${line}`,
    column !== undefined && `column ${column}`,
    line === undefined && byte !== undefined && `byte ${byte}`,
  ].filter(Boolean);
  const missing = place.filter((part) => !message.toLowerCase().includes(String(part)));
  return `${message}${missing.length ? ` (${missing.join(', ')})` : ''} ${mend}`;
}
