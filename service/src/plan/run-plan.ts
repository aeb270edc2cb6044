import { createHash } from 'node:crypto';
import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import { openTaskPool, type TaskPool } from '../matching/task-pool.ts';
import type { EngineInput } from '../scoring/engine-input.ts';
import type { RowSelection } from '../scoring/row-selection.ts';
import { runScoring } from '../scoring/run-engine.ts';
import type { ScoringAsked } from '../scoring/scoring-task.ts';
import { SCORING_VERSION } from '../scoring/version.ts';
import type { PlanAsked } from './plan.worker.ts';
import type { PlanUnit } from './plan-lines.ts';
import { PlanOutputs } from './plan-outputs.ts';
import type { ReadPlan } from './read-plan.ts';
import type { PlanTable } from './read-plan-table.ts';
import { type ReadOne, readTables } from './read-tables.ts';

export type Progress = (fraction: number, message: string) => void;

/** Share of the work that reading takes, for the progress. */
const READING = 0.4;

/**
 * Carries out a plan: reads its tables, scores its detections, writes its outputs.
 *
 * @param folder where the outputs go; made if it is not there
 * @returns the summary, as written
 * @throws {PlanError} for a plan that cannot be carried out; nothing is written then
 */
export async function runPlan(
  read: ReadPlan,
  folder: string,
  onProgress: Progress,
  { worker, threads }: PlanPlace,
): Promise<Summary> {
  const pool = openTaskPool<PlanAsked, unknown, string>(worker, {
    ...(threads !== undefined && { threads }),
    restore: (message) => new Error(message),
  });
  try {
    const tables = await readTables(
      read,
      (fraction, message) => onProgress(READING * fraction, message),
      (task) => pool.ask({ read: task }) as ReturnType<ReadOne>,
      (detections) => pool.ask({ select: inputOf(read, detections) }) as Promise<RowSelection>,
    );
    return await scorePlan(read, tables, folder, onProgress, pool);
  } finally {
    await pool.close();
  }
}

async function scorePlan(
  read: ReadPlan,
  tables: readonly PlanTable[],
  folder: string,
  onProgress: Progress,
  pool: TaskPool<PlanAsked, unknown>,
): Promise<Summary> {
  const { plan } = read;
  const input = inputOf(read, tables);
  const outputs = new PlanOutputs(folder, plan.outputs);
  try {
    const counts = { detections: 0, starlight: {}, surroundings: {}, candidates: 0, neighbours: 0 };
    const place = {
      threads: pool.threads,
      ask: (asked: ScoringAsked) => pool.ask({ ...asked, outputs: plan.outputs }),
    };
    const take = (unit: PlanUnit) => {
      outputs.add(unit);
      for (const name of ['detections', 'candidates', 'neighbours'] as const) counts[name] += unit[name];
      for (const name of ['starlight', 'surroundings'] as const) addCounts(counts[name], unit[name]);
    };
    const result = await runScoring<PlanUnit>(place, input, take, {
      onProgress: (fraction, message) => onProgress(READING + (1 - READING) * fraction, message),
    });
    const summary = {
      survey: plan.survey,
      caution: SCREENING_CAUTION,
      scoring: SCORING_VERSION,
      inputHash: inputHash(read, tables),
      counts,
      notes: result.notes,
      control: result.control,
      tables: tables.map(summarise),
      criteria: plan.criteria,
    };
    outputs.finish(summary);
    return summary;
  } catch (error) {
    outputs.discard();
    throw error;
  }
}

function inputOf({ plan }: ReadPlan, tables: readonly PlanTable[]): EngineInput {
  return {
    survey: plan.survey.cosmology,
    criteria: plan.criteria,
    catalogues: tables.map(({ catalogue }) => catalogue),
    decisions: { overrides: [], distances: [] },
  };
}

function addCounts(sums: Record<string, number>, more: Record<string, number>): void {
  for (const [word, count] of Object.entries(more)) sums[word] = (sums[word] ?? 0) + count;
}

/** The built worker of a plan, and how many threads of it; as many as there are processors unless given. */
export interface PlanPlace {
  worker: URL;
  threads?: number;
}

export interface Summary {
  counts: { detections: number; starlight: Record<string, number>; surroundings: Record<string, number> };
  notes: string[];
}

function inputHash({ plan }: ReadPlan, tables: readonly PlanTable[]): string {
  const parts = [
    SCORING_VERSION,
    plan.survey.cosmology,
    plan.criteria,
    tables.map((table) => [table.sha256, table.reading.resolved]),
  ];
  return createHash('sha256').update(JSON.stringify(parts)).digest('hex');
}

function summarise({ file, sha256, reading, catalogue }: PlanTable) {
  const { check, assumed, questions, facts, coverage, resolved, sidelined } = reading;
  return {
    file,
    name: catalogue.name,
    kind: catalogue.kind,
    format: reading.format,
    sha256,
    rows: check.rows,
    usable: check.usable,
    sidelined: check.sidelined,
    leftOut: check.leftOut,
    sidelinedRows: sidelined.slice(0, 100),
    withVelocity: facts.withVelocity,
    coverage: { type: coverage.type, areaSqDeg: coverage.areaSqDeg, note: coverage.note },
    assumed,
    warnings: questions.filter(({ level }) => level === 'warning').map(({ text }) => text),
    settings: resolved,
  };
}
