import { AppError } from '../../common/app-error.ts';
import { workerUrl } from '../../common/worker-url.ts';
import { openTaskPool } from '../../matching/task-pool.ts';
import { type RunResult, runScoring } from '../../scoring/run-engine.ts';
import type { ScoringAsked } from '../../scoring/scoring-task.ts';
import { type ReadingAsked, readRunTables } from './read-run-tables.ts';
import type { RunSource } from './run-inputs.ts';
import type { StoredUnit, StoredVerdict, ThreadFailure } from './run-messages.ts';
import { errorOf } from './thread-failure.ts';

export interface RunHooks {
  /** Threads to use. */
  threads: number;
  /** Most bytes of rows that a run may hold. */
  memoryBytes: number;
  /** Most bytes of heap of one thread. */
  threadMemoryBytes: number;
  signal: AbortSignal;
  progress(fraction: number, message: string): void;
  /** Stores a batch; threads run at most a few units ahead of it. */
  take(verdicts: StoredVerdict[]): Promise<void>;
}

export type RunOutcome = RunResult & { totals: { candidates: number; neighbours: number } };

/** Share of the time that reading the tables takes, for the progress. */
const READING = 0.2;

/**
 * Reads and scores a run in threads of its own. Aborting ends them at once: they hold nothing that needs tidying.
 *
 * @throws the signal's reason; {AppError} RUN_FAILED if a thread fails or dies
 */
export async function scoreInThreads(source: RunSource, hooks: RunHooks): Promise<RunOutcome> {
  const { threads, memoryBytes, signal, progress } = hooks;
  signal.throwIfAborted();
  const pool = openTaskPool<ScoringAsked | ReadingAsked, unknown, ThreadFailure>(workerUrl('run'), {
    threads,
    heapMiB: Math.max(16, Math.floor(hooks.threadMemoryBytes / 2 ** 20)),
    restore: errorOf,
  });
  let onAbort!: () => void;
  const aborted = new Promise<never>((_, reject) => {
    onAbort = () => reject(signal.reason as Error);
    signal.addEventListener('abort', onAbort, { once: true });
  });
  aborted.catch(() => undefined);
  const ask = async (asked: ScoringAsked | ReadingAsked): Promise<unknown> => {
    try {
      return await Promise.race([pool.ask(asked), aborted]);
    } catch (error) {
      throw signal.aborted ? signal.reason : asFailure(error, hooks.threadMemoryBytes);
    }
  };
  /** The batch being stored: whoever tidies up after the run must not meet it still on its way. */
  let storing: Promise<void> = Promise.resolve();
  const totals = { candidates: 0, neighbours: 0 };
  try {
    const reading = readRunTables(source, {
      threads,
      memoryBytes,
      ask,
      signal,
      progress: (fraction, message) => progress(READING * fraction, message),
    });
    // Left behind when the run is cancelled; it then ends by itself.
    reading.catch(() => undefined);
    const input = await Promise.race([reading, aborted]);
    const take = async ({ verdicts, candidates, neighbours }: StoredUnit): Promise<void> => {
      signal.throwIfAborted();
      totals.candidates += candidates;
      totals.neighbours += neighbours;
      storing = hooks.take(verdicts);
      await Promise.race([storing, aborted]);
    };
    const result = await runScoring<StoredUnit>({ threads, ask }, input, take, {
      signal,
      onProgress: (fraction, message) => progress(READING + (1 - READING) * fraction, message),
    });
    return { ...result, totals };
  } finally {
    signal.removeEventListener('abort', onAbort);
    await pool.close();
    await storing.catch(() => undefined);
  }
}

/** What the death of a thread is to whoever started the run; refusals are that already. */
function asFailure(error: unknown, threadMemoryBytes: number): Error {
  if (error instanceof AppError) return error;
  const { message, stack } = error instanceof Error ? error : new Error(String(error));
  if ((error as { code?: string }).code === 'ERR_WORKER_OUT_OF_MEMORY' || /worker exited/.test(message)) {
    const failure = new AppError(
      'RUN_FAILED',
      `A thread that scores ended early; it may have run out of memory (it is allowed ${Math.floor(threadMemoryBytes / 2 ** 20)} MiB, EREMITE_THREAD_MEMORY). The tables and earlier runs are as they were.`,
    );
    return Object.assign(failure, { cause: error });
  }
  return errorOf({ message, ...(stack !== undefined && { stack }), cause: 'inside' });
}
