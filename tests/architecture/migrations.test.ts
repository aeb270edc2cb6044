import { spawnSync } from 'node:child_process';
import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

const SCHEMA = join(import.meta.dirname, '../../schema');
const MIGRATIONS = join(SCHEMA, 'migrations');

describe('the migrations', () => {
  it('carry stamps that only grow, since an older one merged later would be skipped in silence', () => {
    const { entries } = JSON.parse(readFileSync(join(MIGRATIONS, 'meta/_journal.json'), 'utf8')) as {
      entries: { idx: number; when: number; tag: string }[];
    };
    const stamps = entries.map((entry) => entry.when);
    expect(stamps).toEqual([...new Set(stamps)].sort((a, b) => a - b));
    expect(entries.map((entry) => entry.idx)).toEqual(entries.map((_, i) => i));
    const files = readdirSync(MIGRATIONS).filter((name) => name.endsWith('.sql'));
    expect(files.sort()).toEqual(entries.map((entry) => `${entry.tag}.sql`).sort());
  });

  it('say all that the tables say', () => {
    // Inside the project, so that the command finds the packages the tables import.
    const copy = mkdtempSync(join(SCHEMA, '../node_modules/.cache-migrations-'));
    try {
      cpSync(MIGRATIONS, copy, { recursive: true });
      const before = readdirSync(copy).length;
      const args = ['drizzle-kit', 'generate', '--dialect', 'postgresql', '--schema', './src/tables', '--out', copy];
      const { status, stdout, stderr } = spawnSync('npx', args, { cwd: SCHEMA, encoding: 'utf8' });
      expect(status, stdout + stderr).toBe(0);
      expect(readdirSync(copy).length, 'run npm run db:generate').toBe(before);
    } finally {
      rmSync(copy, { recursive: true, force: true });
    }
  });
});
