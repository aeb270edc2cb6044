import { describe, expect, it } from 'vitest';
import { guardJson } from './json-guard.ts';

const guard = (text: string) => () => guardJson(new TextEncoder().encode(text));

describe('the guard of JSON', () => {
  it('lets ordinary JSON through, brackets and escapes in its strings included', () => {
    const note = '[['.repeat(100) + ' \\u0000 \\" \u00e9 "';
    expect(guard(JSON.stringify({ note, list: [[1], { a: null }] }))).not.toThrow();
  });

  it('counts levels, not brackets', () => {
    expect(guard(`[${Array(500).fill('[]').join(',')}]`)).not.toThrow();
    expect(guard('['.repeat(64) + ']'.repeat(64))).not.toThrow();
    expect(guard('['.repeat(65) + ']'.repeat(65))).toThrow('nested');
    expect(guard('{"a":'.repeat(100_000))).toThrow('nested');
  });

  it('refuses NUL in values and in keys', () => {
    expect(guard(JSON.stringify({ name: 'a\0b' }))).toThrow('NUL');
    expect(guard(JSON.stringify({ 'a\0b': 1 }))).toThrow('NUL');
    expect(guard('"\\\\\\u0000"')).toThrow('NUL');
  });
});
