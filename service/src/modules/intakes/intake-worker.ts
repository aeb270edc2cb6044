import { Worker } from 'node:worker_threads';
import { Inject, Injectable, type OnModuleDestroy } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { workerUrl } from '../../common/worker-url.ts';
import { ENV, type Env } from '../../config/env.ts';
import type { CopyPiece } from '../../database/bulk.ts';
import type { Inspection } from '../../intake/inspect.ts';
import type { IntakeFailure, IntakeMessage, IntakeTask } from '../../intake/intake-messages.ts';
import type { Published, PublishSink } from '../../intake/publish.ts';

export interface PublishHooks extends Pick<PublishSink, 'sidelined'> {
  tiles(piece: CopyPiece): Promise<void>;
  progress(fraction: number, rows: number): void;
  signal: AbortSignal;
}
type Finished = { inspection?: Inspection; published?: Published };

/** Threads that read tables at once: more would only take turns on the cores and the memory of each adds up. */
const MOST_THREADS = 2;

/** Reads uploaded tables in threads of their own, and tells their failures as the errors of the interface. */
@Injectable()
export class IntakeWorker implements OnModuleDestroy {
  private running = 0;
  private readonly waiting: (() => void)[] = [];
  /** Threads that wait for a table; starting one takes as long as reading a small table. */
  private idle: Worker[] = [];

  constructor(@Inject(ENV) private readonly env: Pick<Env, 'tableLimits'>) {}

  /** @throws {AppError} TABLE_UNREADABLE */
  async inspect(file: Omit<IntakeTask, 'what'>): Promise<Inspection> {
    const { inspection } = await this.queued((worker) => run(worker, { what: 'inspect', ...file }));
    return inspection!;
  }

  /** @throws {AppError} TABLE_UNREADABLE, SETTINGS_INCOMPLETE; and the signal's reason */
  async publish(file: Omit<IntakeTask, 'what'>, hooks: PublishHooks): Promise<Published> {
    const { published } = await this.queued((worker) => run(worker, { what: 'publish', ...file }, hooks));
    return published!;
  }

  async onModuleDestroy(): Promise<void> {
    await Promise.all(this.idle.splice(0).map((worker) => worker.terminate()));
  }

  private async queued<T>(work: (worker: Worker) => Promise<T>): Promise<T> {
    if (this.running >= MOST_THREADS) await new Promise<void>((resolve) => this.waiting.push(resolve));
    else this.running++;
    const worker = this.idle.pop() ?? this.start();
    worker.ref();
    try {
      const result = await work(worker);
      this.rest(worker);
      return result;
    } catch (error) {
      // A thread that said clearly what is wrong with a table can go on; any other may be in the middle of something.
      if (error instanceof AppError) this.rest(worker);
      else await worker.terminate();
      throw error;
    } finally {
      const next = this.waiting.shift();
      if (next) next();
      else this.running--;
    }
  }

  private rest(worker: Worker): void {
    worker.unref();
    this.idle.push(worker);
  }

  private start(): Worker {
    const worker = new Worker(workerUrl('intake'), { workerData: this.env.tableLimits });
    worker.once('exit', () => (this.idle = this.idle.filter((other) => other !== worker)));
    // Without a listener an error in an idle thread would end the process.
    worker.on('error', () => undefined);
    return worker;
  }
}

function run(worker: Worker, task: IntakeTask, hooks?: PublishHooks): Promise<Finished> {
  hooks?.signal.throwIfAborted();
  return new Promise<Finished>((resolve, reject) => {
    const onAbort = () => end(() => reject(hooks?.signal.reason as Error));
    const onError = (error: Error) => end(() => reject(error));
    const onExit = (code: number) =>
      end(() => reject(new Error(`the thread reading the table ended early (code ${code})`)));
    const end = (settle: () => void) => {
      hooks?.signal.removeEventListener('abort', onAbort);
      worker.off('message', onMessage).off('error', onError).off('exit', onExit);
      settle();
    };
    const take = async (message: IntakeMessage): Promise<void> => {
      if (message.kind === 'inspected') end(() => resolve({ inspection: message.inspection }));
      else if (message.kind === 'published') end(() => resolve({ published: message.published }));
      else if (message.kind === 'failed') end(() => reject(told(message.failure)));
      else if (message.kind === 'progress') hooks?.progress(message.fraction, message.rows);
      else {
        await (message.kind === 'tiles' ? hooks?.tiles(message.piece) : hooks?.sidelined(message.rows));
        worker.postMessage('taken');
      }
    };
    // What fails while taking is no word of the thread about its table: wrapped, so that the thread is not kept.
    const onMessage = (message: IntakeMessage) =>
      void take(message).catch((cause: unknown) => onError(new Error('storing the table failed', { cause })));
    hooks?.signal.addEventListener('abort', onAbort, { once: true });
    worker.on('message', onMessage).on('error', onError).on('exit', onExit);
    worker.postMessage(task);
  });
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
