import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { readPlan } from '../../plan/read-plan.ts';
import { readTables } from '../../plan/read-tables.ts';
import type { ControlResult } from '../control-run.ts';
import { runEngine } from '../run-engine.ts';
import type { ScoredDetection } from '../scored-detection.ts';

/** A table as lines of CSV, the header first, and how it is read. */
export interface TestTable {
  lines: readonly string[];
  settings: Record<string, unknown>;
}

export interface Scored {
  scored: ScoredDetection[];
  notes: string[];
  control: ControlResult | null;
  /** What intake said of each table, in order. */
  warnings: string[][];
}

/** Reads small tables as a plan would and scores them, draws and control switched off unless asked for. */
export async function scoreTables(
  tables: readonly TestTable[],
  criteria: Record<string, object> = {},
): Promise<Scored> {
  const folder = mkdtempSync(join(tmpdir(), 'eremite-score-'));
  try {
    tables.forEach(({ lines }, i) => writeFileSync(join(folder, `${i}.csv`), [...lines, ''].join('\n')));
    const plan = {
      tables: tables.map(({ settings }, i) => ({ file: `${i}.csv`, settings })),
      criteria: { robustness: { draws: 0 }, control: { offsetsPerSource: 0 }, ...criteria },
    };
    const path = join(folder, 'plan.json');
    writeFileSync(path, JSON.stringify(plan));
    const read = readPlan(path);
    const ready = await readTables(read, () => undefined);
    const scored: ScoredDetection[] = [];
    const { notes, control } = await runEngine(
      {
        survey: read.plan.survey.cosmology,
        criteria: read.plan.criteria,
        catalogues: ready.map(({ catalogue }) => catalogue),
        decisions: { overrides: [], distances: [] },
      },
      (some) => void scored.push(...some),
    );
    const warnings = ready.map(({ reading }) => [
      ...reading.assumed.map((each) => JSON.stringify(each)),
      ...reading.questions.map(({ text }) => text),
    ]);
    return { scored, notes, control, warnings };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Sentences of the grounds of a scored detection. */
export const textsOf = ({ item }: ScoredDetection): string[] => item.grounds.map(({ text }) => text);
