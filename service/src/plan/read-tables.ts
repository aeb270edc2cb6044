import type { RowSelection } from '../scoring/row-selection.ts';
import { PlanError, type ReadPlan } from './read-plan.ts';
import { type PlanTable, type PlanTableTask, readPlanTable } from './read-plan-table.ts';

export type ReadOne = (task: PlanTableTask) => Promise<{ table: PlanTable } | { faults: string[] }>;

/** Finds where rows of the other tables can matter to some tables of detections. */
export type SelectRows = (detections: readonly PlanTable[]) => Promise<RowSelection>;

/**
 * Reads the tables of a plan, side by side where `read` allows it: the detections first, since of the other tables only
 * the rows that can matter to them are kept.
 *
 * @param select if given, else all rows are kept
 * @throws {PlanError} with the faults of all tables, a line each
 */
export async function readTables(
  { plan, files }: ReadPlan,
  onProgress: (fraction: number, message: string) => void,
  read: ReadOne = readPlanTable,
  select?: SelectRows,
): Promise<PlanTable[]> {
  let done = 0;
  const answers: Awaited<ReturnType<ReadOne>>[] = [];
  const readSome = (wanted: (kind: string | undefined) => boolean, selection?: RowSelection) =>
    Promise.all(
      files.map(async (path, index) => {
        const { file, settings } = plan.tables[index]!;
        if (!wanted(settings.kind)) return;
        answers[index] = await read({ path, file, index, settings, ...(selection && { selection }) });
        onProgress(++done / files.length, `read ${file}`);
      }),
    );
  await readSome((kind) => kind === 'hi');
  const detections = answers.flatMap((answer) => ('table' in answer ? [answer.table] : []));
  const selection = select && detections.length > 0 ? await select(detections) : undefined;
  await readSome((kind) => kind !== 'hi', selection);
  const tables = answers.flatMap((answer) => ('table' in answer ? [answer.table] : []));
  const faults = answers.flatMap((answer) => ('faults' in answer ? answer.faults : []));
  if (faults.length === 0 && !tables.some(({ catalogue }) => catalogue.kind === 'hi')) {
    faults.push('No table of the plan is of kind "hi": there are no detections to judge.');
  }
  if (faults.length > 0) throw new PlanError(faults);
  return tables;
}
