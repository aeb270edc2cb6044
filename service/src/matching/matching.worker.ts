import { type MatchingTasks, runTask, type TaskName } from './matching-task.ts';

/** Entry of a pool thread: a thin shell round `runTask`, which tests call directly. */
export default function run<N extends TaskName>({ name, task }: { name: N; task: MatchingTasks[N]['task'] }) {
  return runTask(name, task);
}
