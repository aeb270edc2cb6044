import { closeSync, mkdirSync, openSync, renameSync, rmSync, writeFileSync, writeSync } from 'node:fs';
import { join } from 'node:path';
import { csvLine } from './csv-line.ts';
import { PLAN_COLUMNS, type PlanOutput, type PlanTableFile, type PlanUnit } from './plan-lines.ts';

const TEMPORARY = '.unfinished';

/**
 * The files a plan leaves behind. They are written beside their names and moved into place together at the end, so that
 * an interrupted plan leaves nothing that looks finished.
 */
export class PlanOutputs {
  private readonly files = new Map<PlanTableFile, number>();
  private readonly written: PlanOutput[] = [];
  private readonly made: string | undefined;

  constructor(
    private readonly folder: string,
    private readonly wanted: readonly PlanOutput[],
  ) {
    this.made = mkdirSync(folder, { recursive: true });
    for (const name of wanted) {
      if (name === 'summary.json') continue;
      const file = openSync(join(folder, name + TEMPORARY), 'w');
      this.files.set(name, file);
      this.written.push(name);
      writeSync(file, csvLine(PLAN_COLUMNS[name]));
    }
  }

  add({ text }: PlanUnit): void {
    for (const [name, file] of this.files) {
      const lines = text[name];
      if (lines) writeSync(file, lines);
    }
  }

  /** Moves everything into place. */
  finish(summary: unknown): void {
    for (const file of this.files.values()) closeSync(file);
    if (this.wanted.includes('summary.json')) {
      writeFileSync(join(this.folder, `summary.json${TEMPORARY}`), `${JSON.stringify(summary, null, 2)}\n`);
      this.written.push('summary.json');
    }
    for (const name of this.written) renameSync(join(this.folder, name + TEMPORARY), join(this.folder, name));
  }

  /** Takes away what was begun. */
  discard(): void {
    for (const file of this.files.values()) {
      try {
        closeSync(file);
      } catch {
        // Already closed: the file goes all the same.
      }
    }
    for (const name of this.wanted) rmSync(join(this.folder, name + TEMPORARY), { force: true });
    if (this.made) rmSync(this.made, { recursive: true, force: true });
  }
}
