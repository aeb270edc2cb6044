import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { CRITERIA_FIELDS } from '#lib/criteria/criteria-fields.ts';
import { METHODS } from './methods.ts';

const SCORING = join(import.meta.dirname, '../../../../service/src/scoring');

/** Methods that the service names in its grounds: the last argument of `say`, or the key `method`. */
function namedByService(): string[] {
  const text = readdirSync(SCORING)
    .filter((name) => name.endsWith('.ts') && !name.endsWith('.spec.ts'))
    .map((name) => readFileSync(join(SCORING, name), 'utf8'))
    .join('\n');
  const found = [...text.matchAll(/method: '([a-z-]+)'|[`'],\s*'([a-z-]+)',?\s*\)/g)];
  return [...new Set(found.map(([, key, last]) => (key ?? last)!))].filter((id) => id !== '-');
}

describe('the methods page', () => {
  it('has an entry for every method that grounds name', () => {
    const named = namedByService();
    expect(named).toContain('counterpart');
    expect(named).toContain('surroundings');
    const ids = METHODS.map(({ id }) => id);
    expect(named.filter((id) => !ids.includes(id))).toEqual([]);
    expect(new Set(ids).size).toBe(ids.length);
  });

  it('names only criteria that exist', () => {
    const keys = CRITERIA_FIELDS.map(({ section, key }) => `${section}.${key}`);
    expect(METHODS.flatMap(({ criteria }) => criteria).filter((key) => !keys.includes(key))).toEqual([]);
  });
});
