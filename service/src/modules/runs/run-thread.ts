import { Worker } from 'node:worker_threads';
import { workerUrl } from '../../common/worker-url.ts';
import type { EngineInput } from '../../scoring/engine-input.ts';
import type { Column } from '../../tiles/column-pack.ts';
import type { RunMessage, RunTask, StoredVerdict } from './run-messages.ts';

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
 * @throws the signal's reason; an Error with the reason if the thread fails or dies
 */
export async function scoreInThread(input: EngineInput, hooks: RunHooks): Promise<RunOutcome> {
  hooks.signal.throwIfAborted();
  const task: RunTask = { input };
  const worker = new Worker(workerUrl('run'), { workerData: task, transferList: buffersOf(input) });
  return new Promise<RunOutcome>((resolve, reject) => {
    hooks.signal.addEventListener('abort', () => reject(hooks.signal.reason as Error), { once: true });
    const take = async (message: RunMessage): Promise<void> => {
      if (message.kind === 'progress') hooks.progress(message.fraction, message.message);
      else if (message.kind === 'done') resolve(message);
      else if (message.kind === 'failed') reject(Object.assign(new Error(message.message), { stack: message.stack }));
      else {
        await hooks.take(message.verdicts);
        worker.postMessage('taken');
      }
    };
    worker.on('message', (message: RunMessage) => void take(message).catch(reject));
    worker.once('error', (error) => reject(new Error(`the scoring thread failed: ${error.message}`)));
    worker.once('exit', (code) => reject(new Error(`the scoring thread ended early (code ${code})`)));
  }).finally(() => void worker.terminate());
}

/** Memory of the tables, handed over to the thread instead of being copied. Shared memory needs no handing over. */
function buffersOf({ catalogues }: EngineInput): ArrayBuffer[] {
  const buffers = new Set<ArrayBuffer>();
  const add = (array: { buffer: ArrayBufferLike }) => {
    if (array.buffer instanceof ArrayBuffer) buffers.add(array.buffer);
  };
  for (const { roles } of catalogues) {
    for (const column of Object.values<Column>(roles.columns)) {
      if ('kind' in column) [column.offsets, column.bytes].forEach(add);
      else add(column);
    }
  }
  return [...buffers];
}
