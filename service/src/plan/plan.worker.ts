import type { TaskAnswer } from '../matching/task-pool.ts';
import type { EngineInput } from '../scoring/engine-input.ts';
import { selectionOf } from '../scoring/row-selection.ts';
import { type ScoringAsked, scoringDesk } from '../scoring/scoring-task.ts';
import { type PlanOutput, planUnit } from './plan-lines.ts';
import { type PlanTableTask, readPlanTable } from './read-plan-table.ts';

/** What a thread of a plan is asked: to read a table, to find where rows matter, or to do a step of the scoring. */
export type PlanAsked =
  { read: PlanTableTask } | { select: EngineInput } | (ScoringAsked & { outputs: readonly PlanOutput[] });

let outputs: readonly PlanOutput[] = [];
const desk = scoringDesk((scored) => planUnit(scored, outputs));

export default async function answer(asked: PlanAsked): Promise<TaskAnswer<unknown, string>> {
  try {
    if ('read' in asked) return { result: await readPlanTable(asked.read) };
    if ('select' in asked) return { result: selectionOf(asked.select) };
    outputs = asked.outputs;
    return { result: desk(asked) };
  } catch (error) {
    return { refused: error instanceof Error ? error.message : String(error) };
  }
}
