import { describe, expect, it } from 'vitest';
import { canonicalJson, ledgerHash } from './ledger-hash.ts';

const line = {
  surveyId: '01234567-89ab-cdef-0123-456789abcdef',
  number: 1,
  at: new Date('2026-01-02T03:04:05.678Z'),
  actorId: null,
  actor: 'Ada Example',
  action: 'survey created',
  subject: 'field',
  note: '',
  detail: { b: 1, a: [0.1, { z: null, y: 'x' }] },
  previousHash: '',
};

describe('the ledger hash', () => {
  it('does not depend on the order of keys, which the database does not keep', () => {
    expect(ledgerHash({ ...line, detail: { a: [0.1, { y: 'x', z: null }], b: 1 } })).toBe(ledgerHash(line));
    expect(canonicalJson({ b: undefined, a: 1 })).toBe('{"a":1}');
  });

  it.each([
    'number',
    'at',
    'actor',
    'action',
    'subject',
    'note',
    'detail',
    'previousHash',
    'surveyId',
    'actorId',
  ] as const)('covers %s', (key) => {
    const other = key === 'at' ? new Date(0) : key === 'number' ? 2 : 'something else';
    expect(ledgerHash({ ...line, [key]: other })).not.toBe(ledgerHash(line));
  });

  it('cannot be kept by moving text from one field to the next', () => {
    expect(ledgerHash({ ...line, action: 'a', subject: 'bc' })).not.toBe(
      ledgerHash({ ...line, action: 'ab', subject: 'c' }),
    );
  });
});
