import { PlanError, type ReadPlan } from './read-plan.ts';
import { type PlanTable, type PlanTableTask, readPlanTable } from './read-plan-table.ts';

export type ReadOne = (task: PlanTableTask) => Promise<{ table: PlanTable } | { faults: string[] }>;

/**
 * Reads the tables of a plan, side by side where `read` allows it.
 *
 * @throws {PlanError} with the faults of all tables, a line each
 */
export async function readTables(
  { plan, files }: ReadPlan,
  onProgress: (fraction: number, message: string) => void,
  read: ReadOne = readPlanTable,
): Promise<PlanTable[]> {
  let done = 0;
  const answers = await Promise.all(
    files.map(async (path, index) => {
      const { file, settings } = plan.tables[index]!;
      const answer = await read({ path, file, index, settings });
      onProgress(++done / files.length, `read ${file}`);
      return answer;
    }),
  );
  const tables = answers.flatMap((answer) => ('table' in answer ? [answer.table] : []));
  const faults = answers.flatMap((answer) => ('faults' in answer ? answer.faults : []));
  if (faults.length === 0 && !tables.some(({ catalogue }) => catalogue.kind === 'hi')) {
    faults.push('No table of the plan is of kind "hi": there are no detections to judge.');
  }
  if (faults.length > 0) throw new PlanError(faults);
  return tables;
}
