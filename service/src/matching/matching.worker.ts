import { DomainError } from '@eremite/shared/science/domain-error';
import { HitLimitError } from './hit-limit.ts';
import type { TaskAnswer } from './matching-pool.ts';
import { type MatchingTasks, runTask, type TaskName } from './matching-task.ts';

/**
 * Entry of a pool thread: a thin shell round `runTask`. Refusals travel as data, because an error loses its class and
 * its fields on the way between threads.
 */
export default function run<N extends TaskName>(asked: { name: N; task: MatchingTasks[N]['task'] }): TaskAnswer<N> {
  try {
    return { result: runTask(asked.name, asked.task) };
  } catch (error) {
    if (error instanceof HitLimitError) return { tooMany: { limit: error.limit, about: error.about } };
    if (error instanceof DomainError) return { astray: error.message };
    throw error;
  }
}
