import { Worker } from 'node:worker_threads';
import { AppError } from '../../common/app-error.ts';
import { workerUrl } from '../../common/worker-url.ts';
import type { PackedInput } from './packed-input.ts';
import type { RunMessage, RunTask, StoredVerdict } from './run-messages.ts';
import { errorOf } from './thread-failure.ts';

export interface RunHooks {
  signal: AbortSignal;
  progress(fraction: number, message: string): void;
  /** Stores a batch; the thread waits for it. */
  take(verdicts: StoredVerdict[]): Promise<void>;
}

export type RunOutcome = Omit<Extract<RunMessage, { kind: 'done' }>, 'kind'>;

/**
 * Scores a run in a thread of its own. Aborting ends the thread at once: it holds nothing that needs tidying.
 *
 * @throws the signal's reason; {AppError} RUN_FAILED if the thread fails or dies
 */
export async function scoreInThread(input: PackedInput, hooks: RunHooks): Promise<RunOutcome> {
  const { signal } = hooks;
  signal.throwIfAborted();
  const task: RunTask = { input };
  const worker = new Worker(workerUrl('run'), { workerData: task });
  let onAbort: () => void;
  /** The batch being stored: whoever tidies up after the run must not meet it still on its way. */
  let storing: Promise<void> = Promise.resolve();
  return new Promise<RunOutcome>((resolve, reject) => {
    onAbort = () => reject(signal.reason as Error);
    signal.addEventListener('abort', onAbort, { once: true });
    const take = async (message: RunMessage): Promise<void> => {
      if (message.kind === 'progress') hooks.progress(message.fraction, message.message);
      else if (message.kind === 'done') resolve(message);
      else if (message.kind === 'failed') reject(errorOf(message));
      else {
        if (signal.aborted) return;
        storing = hooks.take(message.verdicts);
        await storing;
        worker.postMessage('taken');
      }
    };
    worker.on('message', (message: RunMessage) => void take(message).catch(reject));
    worker.once('error', ({ message, stack }) =>
      reject(errorOf({ message, ...(stack !== undefined && { stack }), cause: 'inside' })),
    );
    worker.once('exit', (code) =>
      reject(
        new AppError('RUN_FAILED', `The thread that scores ended early (code ${code}); it may have run out of memory.`),
      ),
    );
  }).finally(async () => {
    signal.removeEventListener('abort', onAbort);
    await worker.terminate();
    await storing.catch(() => undefined);
  });
}
