import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { IntakeWorker } from '@eremite/service/modules/intakes/intake-worker.ts';
import { DEFAULT_LIMITS } from '@eremite/service/tables/table.ts';
import { afterAll, describe, expect, it } from 'vitest';

describe('the threads that read tables', () => {
  const folder = mkdtempSync(join(tmpdir(), 'eremite-test-'));
  const threads = new IntakeWorker({ tableLimits: DEFAULT_LIMITS });
  afterAll(async () => {
    await threads.onModuleDestroy();
    rmSync(folder, { recursive: true, force: true });
  });

  it('are used again without gathering listeners, whether a table can be read or not', async () => {
    const warnings: string[] = [];
    const heed = (warning: Error) => void warnings.push(`${warning.name}: ${warning.message}`);
    process.on('warning', heed);
    const good = join(folder, 'good.csv');
    const bad = join(folder, 'bad.fits');
    writeFileSync(good, 'ra,dec\n1,2\n3,4\n');
    writeFileSync(bad, 'SIMPLE  =                    T');
    for (let i = 0; i < 12; i += 1) {
      expect((await threads.inspect({ path: good, fileName: 'good.csv', settings: {} })).check.rows).toBe(2);
      await expect(threads.inspect({ path: bad, fileName: 'bad.fits', settings: {} })).rejects.toMatchObject({
        code: 'TABLE_UNREADABLE',
      });
    }
    await new Promise((resolve) => setImmediate(resolve));
    process.off('warning', heed);
    expect(warnings).toEqual([]);
  });
});
