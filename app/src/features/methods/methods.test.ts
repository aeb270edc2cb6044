import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import katex from 'katex';
import { bandLimit, verdictDetail, verdictItem } from '@eremite/shared/contracts/verdict';
import { CRITERIA_FIELDS } from '#lib/criteria/criteria-fields.ts';
import { methodsNamed, readDocstrings } from '../../../../shared/scripts/read-docstrings.ts';
import { DOCSTRINGS } from './docstrings.ts';
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

  it('shows the docstrings as they stand in the source; `npm run methods` writes them anew', () => {
    const ids = [...new Set(METHODS.flatMap(({ functions }) => functions))];
    expect(DOCSTRINGS).toEqual(readDocstrings(ids));
  });

  it('and the functions name each other', () => {
    const named = DOCSTRINGS.flatMap((docstring) => methodsNamed(docstring).map((id) => `${id} ${docstring.id}`));
    const listed = METHODS.flatMap(({ id, functions }) => functions.map((name) => `${id} ${name}`));
    expect(named.sort()).toEqual(listed.sort());
  });

  it('sets every formula and symbol', () => {
    for (const { formulas, symbols } of METHODS) {
      for (const tex of [...formulas, ...symbols.map(([symbol]) => symbol)]) {
        expect(() => katex.renderToString(tex, { throwOnError: true, strict: 'error' }), tex).not.toThrow();
      }
    }
  });

  it('has one method for each derived column, and no column that is not there', () => {
    /** Copied from the table, or about people. */
    const given = ['detectionId', 'name', 'raDeg', 'decDeg', 'width50Kms', 'fluxJyKms', 'signalToNoise'];
    const people = ['settled', 'reviews', 'overrides', 'grounds', 'headline'];
    const derived = Object.keys(verdictItem.shape).filter((key) => ![...given, ...people].includes(key));
    const columns = METHODS.flatMap((method) => method.columns);
    expect(new Set(columns).size).toBe(columns.length);
    expect(derived.filter((key) => !columns.includes(key))).toEqual([]);
    const known = [verdictItem, verdictDetail, bandLimit].flatMap(({ shape }) => Object.keys(shape));
    expect(columns.filter((key) => ![...known, 'control'].includes(key))).toEqual([]);
  });
});
