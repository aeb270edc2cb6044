import { AppError } from '../../common/app-error.ts';
import { workerUrl } from '../../common/worker-url.ts';
import { openTaskPool } from '../../matching/task-pool.ts';
import type { EngineCatalogue, EngineInput } from '../../scoring/engine-input.ts';
import { type RunResult, runScoring } from '../../scoring/run-engine.ts';
import type { ScoringAsked } from '../../scoring/scoring-task.ts';
import type { PackedInput, PackedTable } from './packed-input.ts';
import type { StoredUnit, StoredVerdict, ThreadFailure } from './run-messages.ts';
import { errorOf } from './thread-failure.ts';

export interface RunHooks {
  /** Threads to use. */
  threads: number;
  signal: AbortSignal;
  progress(fraction: number, message: string): void;
  /** Stores a batch; threads run at most a few units ahead of it. */
  take(verdicts: StoredVerdict[]): Promise<void>;
}

export type RunOutcome = RunResult & { totals: { candidates: number; neighbours: number } };

/** Share of the work that unpacking the tables is, for the progress. */
const UNPACKING = 0.1;

/**
 * Scores a run in threads of its own. Aborting ends them at once: they hold nothing that needs tidying.
 *
 * @throws the signal's reason; {AppError} RUN_FAILED if a thread fails or dies
 */
export async function scoreInThreads(packed: PackedInput, hooks: RunHooks): Promise<RunOutcome> {
  const { threads, signal, progress } = hooks;
  signal.throwIfAborted();
  const pool = openTaskPool<ScoringAsked | { unpack: PackedTable }, unknown, ThreadFailure>(workerUrl('run'), {
    threads,
    restore: errorOf,
  });
  let onAbort!: () => void;
  const aborted = new Promise<never>((_, reject) => {
    onAbort = () => reject(signal.reason as Error);
    signal.addEventListener('abort', onAbort, { once: true });
  });
  aborted.catch(() => undefined);
  const ask = async (asked: ScoringAsked | { unpack: PackedTable }): Promise<unknown> => {
    try {
      return await Promise.race([pool.ask(asked), aborted]);
    } catch (error) {
      throw signal.aborted ? signal.reason : asFailure(error);
    }
  };
  /** The batch being stored: whoever tidies up after the run must not meet it still on its way. */
  let storing: Promise<void> = Promise.resolve();
  const totals = { candidates: 0, neighbours: 0 };
  try {
    const { tables, ...rest } = packed;
    let unpacked = 0;
    const catalogues = await Promise.all(
      tables.map(async (table) => {
        const catalogue = (await ask({ unpack: table })) as EngineCatalogue;
        progress(UNPACKING * (++unpacked / tables.length), 'unpacking the tables');
        return catalogue;
      }),
    );
    const input: EngineInput = { ...rest, catalogues };
    const take = async ({ verdicts, candidates, neighbours }: StoredUnit): Promise<void> => {
      signal.throwIfAborted();
      totals.candidates += candidates;
      totals.neighbours += neighbours;
      storing = hooks.take(verdicts);
      await Promise.race([storing, aborted]);
    };
    const result = await runScoring<StoredUnit>({ threads, ask }, input, take, {
      signal,
      onProgress: (fraction, message) => progress(UNPACKING + (1 - UNPACKING) * fraction, message),
    });
    return { ...result, totals };
  } finally {
    signal.removeEventListener('abort', onAbort);
    await pool.close();
    await storing.catch(() => undefined);
  }
}

/** What the death of a thread is to whoever started the run; refusals are that already. */
function asFailure(error: unknown): Error {
  if (error instanceof AppError) return error;
  const { message, stack } = error instanceof Error ? error : new Error(String(error));
  if ((error as { code?: string }).code === 'ERR_WORKER_OUT_OF_MEMORY' || /worker exited/.test(message)) {
    const failure = new AppError(
      'RUN_FAILED',
      'A thread that scores ended early; it may have run out of memory. The tables and earlier runs are as they were.',
    );
    return Object.assign(failure, { cause: error });
  }
  return errorOf({ message, ...(stack !== undefined && { stack }), cause: 'inside' });
}
