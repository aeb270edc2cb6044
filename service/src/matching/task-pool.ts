import { availableParallelism } from 'node:os';
import { Piscina } from 'piscina';

/** What a thread of a pool sends back: refusals travel as data, since an error loses its class between threads. */
export type TaskAnswer<Result, Refusal> = { result: Result } | { refused: Refusal };

/** Tasks by name, each with what it is given and what it answers. */
export type TaskList = Record<string, { task: unknown; result: unknown }>;

/** Runs a task somewhere: in a pool of threads, or in this thread. */
export type TaskRunner<Tasks extends { [N in keyof Tasks]: { task: unknown; result: unknown } }> = <
  N extends keyof Tasks,
>(
  name: N,
  task: Tasks[N]['task'],
) => Promise<Tasks[N]['result']>;

/** Threads that work through tasks. */
export interface TaskPool<Asked, Answer> {
  threads: number;
  /** @throws what `restore` makes of a refusal; the error of a thread that died, which is then replaced */
  ask(asked: Asked): Promise<Answer>;
  /** Ends the threads at once, in the middle of whatever they do; what still waits is rejected. */
  close(): Promise<void>;
}

export interface PoolOptions<Refusal> {
  /** As many as there are processors unless given. */
  threads?: number;
  /** Most heap of one thread, MiB; shared memory is not counted. A thread that needs more dies with an error. */
  heapMiB?: number;
  /** Error that a refusal stands for. */
  restore: (refusal: Refusal) => Error;
}

/**
 * Opens a pool.
 *
 * @param worker the built worker, whose default export answers one task
 */
export function openTaskPool<Asked, Answer, Refusal>(
  worker: URL | string,
  { threads = availableParallelism(), heapMiB, restore }: PoolOptions<Refusal>,
): TaskPool<Asked, Answer> {
  const pool = new Piscina({
    filename: worker instanceof URL ? worker.href : worker,
    minThreads: threads,
    maxThreads: threads,
    recordTiming: false,
    ...(heapMiB !== undefined && { resourceLimits: { maxOldGenerationSizeMb: heapMiB } }),
  });
  // A thread that dies while idle rejects no task; without a listener it would end the process.
  pool.on('error', () => undefined);
  return {
    threads,
    ask: async (asked) => {
      const answer = (await pool.run(asked)) as TaskAnswer<Answer, Refusal>;
      if ('refused' in answer) throw restore(answer.refused);
      return answer.result;
    },
    close: () => pool.destroy(),
  };
}
