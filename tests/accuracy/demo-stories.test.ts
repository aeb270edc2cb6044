import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { gunzipSync } from 'node:zlib';
import { DEMO_TABLES, demoFile } from '@eremite/service/modules/demo/demo-tables.ts';
import { readPlan } from '@eremite/service/plan/read-plan.ts';
import { readTables } from '@eremite/service/plan/read-tables.ts';
import { runEngine } from '@eremite/service/scoring/run-engine.ts';
import { criteriaSettings } from '@eremite/shared/contracts/criteria';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

const root = mkdtempSync(join(tmpdir(), 'eremite-demo-'));
afterAll(() => rmSync(root, { recursive: true, force: true }));

describe('the demo survey', () => {
  const verdicts = new Map<string, Set<string>>();

  beforeAll(async () => {
    const plan = join(root, 'plan.json');
    const tables = DEMO_TABLES.map(({ file, settings }) => ({ file: demoFile(file), settings }));
    writeFileSync(plan, JSON.stringify({ tables }));
    const truth = new Map(
      readFileSync(demoFile('truth.csv'), 'utf8')
        .trim()
        .split('\n')
        .map((line) => line.split(',') as [string, string]),
    );
    const read = await readTables(readPlan(plan), () => undefined);
    await runEngine(
      {
        survey: { h0: 70, omegaM: 0.3 },
        criteria: criteriaSettings.parse({ robustness: { draws: 0 }, control: { offsetsPerSource: 0 } }),
        catalogues: read.map(({ catalogue }) => catalogue),
        decisions: { overrides: [], distances: [] },
      },
      (scored) => {
        for (const { item } of scored) {
          const story = truth.get(item.name)!;
          verdicts.set(story, (verdicts.get(story) ?? new Set()).add(`${item.starlight}, ${item.surroundings}`));
        }
      },
    );
  });

  it.each([
    ['dark and alone', ['dark, alone']],
    ['dark with a gas-rich neighbour', ['dark, accompanied']],
    ['low surface brightness', ['nearly dark, accompanied']],
    ['two in a beam', ['confused, accompanied']],
    ['contested', ['contested, alone', 'contested, cannot tell']],
    ['too shallow', ['cannot tell, accompanied']],
    ['masked by a star', ['cannot tell, accompanied']],
    ['not covered', ['cannot tell, accompanied']],
    ['high-velocity cloud', ['cannot tell, cannot tell']],
    ['distance unusable', ['starlit, cannot tell']],
  ])('tells each story as it was written: %s', (story, expected) => {
    expect([...verdicts.get(story)!].sort()).toEqual(expected);
  });

  it('calls no ordinary galaxy dark', () => {
    expect([...verdicts.get('field')!].filter((verdict) => verdict.startsWith('dark'))).toEqual([]);
  });

  it('is made anew by its generator, row by row', () => {
    const generator = new URL('../../testdata/demo/generator/generate.ts', import.meta.url).pathname;
    execFileSync('npx', ['tsx', generator, root], { stdio: 'ignore' });
    for (const name of [...DEMO_TABLES.map(({ file }) => file), 'truth.csv']) {
      const [made, kept] = [join(root, name), demoFile(name)].map((path) => {
        const bytes = readFileSync(path);
        return name.endsWith('.gz') ? gunzipSync(bytes) : bytes;
      });
      expect(made!.equals(kept!), name).toBe(true);
    }
  });
});
