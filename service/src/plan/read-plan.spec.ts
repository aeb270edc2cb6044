import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { PlanError, readPlan } from './read-plan.ts';

const folder = mkdtempSync(join(tmpdir(), 'eremite-read-plan-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));
writeFileSync(join(folder, 'hi.csv'), 'ra,dec\n10,20\n');

function faultsOf(plan: unknown): readonly string[] {
  const path = join(folder, 'plan.json');
  writeFileSync(path, JSON.stringify(plan));
  try {
    readPlan(path);
    return [];
  } catch (error) {
    if (error instanceof PlanError) return error.faults;
    throw error;
  }
}

describe('reading a plan', () => {
  it('asks for the kind of each table in place of guessing it', () => {
    const columns = { ra: 'ra', dec: 'dec' };
    const faults = faultsOf({
      tables: [
        { file: 'hi.csv', settings: { kind: 'hi', columns } },
        { file: 'hi.csv', settings: { columns } },
      ],
    });
    expect(faults).toHaveLength(1);
    expect(faults[0]).toContain('/tables/1/settings/kind: say what hi.csv is: hi, optical, infrared');
  });

  it('tells every fault of every table', () => {
    const faults = faultsOf({ tables: [{ file: 'absent.csv', settings: {} }] });
    expect(faults).toHaveLength(2);
    expect(faults.join()).toMatch(/settings\/kind.*there is no file/);
  });
});
