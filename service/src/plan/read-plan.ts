import { existsSync, readFileSync, statSync } from 'node:fs';
import { dirname, resolve } from 'node:path';
import { plan, type Plan } from '@eremite/shared/contracts/plan';
import { CATALOGUE_KINDS } from '@eremite/shared/contracts/words';

/** A plan that cannot be carried out: one clear message a fault. */
export class PlanError extends Error {
  override readonly name = 'PlanError';
  constructor(readonly faults: readonly string[]) {
    super(faults.join('\n'));
  }
}

export interface ReadPlan {
  plan: Plan;
  /** Full paths of the tables, in order. */
  files: string[];
}

/**
 * Reads and checks a plan file.
 *
 * @param path of the plan; the files it names are relative to it
 * @throws {PlanError} with every fault found
 */
export function readPlan(path: string): ReadPlan {
  let text: string;
  try {
    text = readFileSync(path, 'utf8');
  } catch (error) {
    throw new PlanError([`${path}: cannot be read (${(error as Error).message}).`]);
  }
  let json: unknown;
  try {
    json = JSON.parse(text.replace(/^\ufeff/, ''));
  } catch (error) {
    throw new PlanError([`${path}: is not valid JSON (${(error as Error).message}).`]);
  }
  const parsed = plan.safeParse(json);
  if (!parsed.success) {
    throw new PlanError(
      parsed.error.issues.map(({ path: at, message }) => `${path}: /${at.map(String).join('/')}: ${message}`),
    );
  }
  const faults: string[] = [];
  const files = parsed.data.tables.map(({ file, settings }, i) => {
    // A guessed kind would decide silently whether a table is searched for counterparts or holds the detections.
    if (!settings.kind)
      faults.push(`${path}: /tables/${i}/settings/kind: say what ${file} is: ${CATALOGUE_KINDS.join(', ')}.`);
    const full = resolve(dirname(path), file);
    if (!existsSync(full)) faults.push(`${path}: /tables/${i}/file: there is no file ${full}.`);
    else if (!statSync(full).isFile()) faults.push(`${path}: /tables/${i}/file: ${full} is not a file.`);
    return full;
  });
  if (faults.length > 0) throw new PlanError(faults);
  return { plan: parsed.data, files };
}
