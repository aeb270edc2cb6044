import { createHash } from 'node:crypto';
import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import { runEngine } from '../scoring/run-engine.ts';
import { SCORING_VERSION } from '../scoring/version.ts';
import type { ReadPlan } from './read-plan.ts';
import { PlanOutputs } from './plan-outputs.ts';
import { type PlanTable, readTables } from './read-tables.ts';
import type { EngineInput } from '../scoring/engine-input.ts';

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
export async function runPlan(read: ReadPlan, folder: string, onProgress: Progress): Promise<Summary> {
  const { plan } = read;
  const tables = await readTables(read, (fraction, message) => onProgress(READING * fraction, message));
  const input: EngineInput = {
    survey: plan.survey.cosmology,
    criteria: plan.criteria,
    catalogues: tables.map(({ catalogue }) => catalogue),
    decisions: { overrides: [], distances: [] },
  };
  const outputs = new PlanOutputs(folder, plan.outputs);
  try {
    const counts = {
      detections: 0,
      starlight: {} as Record<string, number>,
      surroundings: {} as Record<string, number>,
    };
    let candidates = 0;
    let neighbours = 0;
    const result = await runEngine(
      input,
      (scored, engine) => {
        outputs.add(scored, engine);
        for (const { item, ...rest } of scored) {
          counts.detections++;
          counts.starlight[item.starlight] = (counts.starlight[item.starlight] ?? 0) + 1;
          counts.surroundings[item.surroundings] = (counts.surroundings[item.surroundings] ?? 0) + 1;
          candidates += rest.candidates.length;
          neighbours += rest.neighbours.length;
        }
      },
      { onProgress: (fraction, message) => onProgress(READING + (1 - READING) * fraction, message) },
    );
    const summary = {
      survey: plan.survey,
      caution: SCREENING_CAUTION,
      scoring: SCORING_VERSION,
      inputHash: inputHash(read, tables),
      counts: { ...counts, candidates, neighbours },
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
