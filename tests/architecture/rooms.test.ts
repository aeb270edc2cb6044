import { join } from 'node:path';
import { cruise, type ICruiseResult } from 'dependency-cruiser';
import { describe, expect, it } from 'vitest';

const ROOT = join(import.meta.dirname, '../..');

describe('the rooms', () => {
  it('are entered only by who may', async () => {
    const { default: rules } = (await import(join(ROOT, '.dependency-cruiser.mjs'))) as {
      default: { forbidden: object[]; options: object };
    };
    const { output } = await cruise(
      ['shared/src', 'schema/src', 'service/src', 'app/src'],
      { ...rules.options, baseDir: ROOT, validate: true, ruleSet: { forbidden: rules.forbidden } } as never,
      undefined,
      { tsConfig: undefined },
    );
    const { summary } = output as ICruiseResult;
    expect(summary.totalCruised).toBeGreaterThan(50);
    const breaches = summary.violations.map(({ rule, from, to }) => `${rule.name}: ${from} -> ${to}`);
    expect(breaches).toEqual([]);
  });
});
