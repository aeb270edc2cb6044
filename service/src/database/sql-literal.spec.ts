import { describe, expect, it } from 'vitest';
import { withLiterals } from './sql-literal.ts';

describe('withLiterals', () => {
  it('writes texts so that none can end its own quotes', () => {
    expect(withLiterals('a = $1', ["x'; drop table users; --"])).toBe("a = 'x''; drop table users; --'");
  });

  it('does not look for values inside values', () => {
    expect(withLiterals('$1, $2', ['$2', 'b'])).toBe("'$2', 'b'");
  });

  it('writes numbers and lists, also empty ones', () => {
    expect(withLiterals('$1 $2 $3', [1.5, [1, 'a'], []])).toBe("1.5 array[1,'a'] '{}'");
  });

  it('refuses what SQL cannot carry and places without a value', () => {
    expect(() => withLiterals('$1', [Number.NaN])).toThrow('NaN');
    expect(() => withLiterals('$2', ['a'])).toThrow('$2');
  });
});
