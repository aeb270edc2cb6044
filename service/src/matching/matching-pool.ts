import { availableParallelism } from 'node:os';
import { Piscina } from 'piscina';
import { DomainError } from '@eremite/shared/science/domain-error';
import { HitLimitError } from './hit-limit.ts';
import type { MatchingTasks, TaskName, TaskRunner } from './matching-task.ts';

/** What a pool thread sends back. */
export type TaskAnswer<N extends TaskName> =
  { result: MatchingTasks[N]['result'] } | { tooMany: { limit: number; about: number } } | { astray: string };

/** Threads that run matching tasks. */
export interface MatchingPool {
  threads: number;
  /**
   * @param signal stops the tasks run with it: those waiting are dropped, the threads of those running are ended and
   *   replaced, whereupon the promise rejects with an AbortError. Memory shared with such a task is left half written.
   * @returns a runner of tasks; what a kernel throws is thrown again here with its class
   */
  runner(signal?: AbortSignal): TaskRunner;
  /** Waits for running tasks, then ends the threads. */
  close(): Promise<void>;
}

/**
 * Opens a pool. A thread that crashes rejects its task and is replaced; the pool stays usable.
 *
 * @param workerFile path or file URL of the built `matching.worker`
 * @param threads as many as there are processors unless given
 */
export function openMatchingPool(workerFile: string, threads = availableParallelism()): MatchingPool {
  const pool = new Piscina({ filename: workerFile, minThreads: threads, maxThreads: threads });
  const runner = (signal?: AbortSignal): TaskRunner => {
    return async (name, task) => {
      const answer = (await pool.run({ name, task }, signal ? { signal } : {})) as TaskAnswer<typeof name>;
      if ('result' in answer) return answer.result;
      if ('tooMany' in answer) throw new HitLimitError(answer.tooMany.limit, answer.tooMany.about);
      throw new DomainError(answer.astray);
    };
  };
  return { threads, runner, close: () => pool.close() };
}
