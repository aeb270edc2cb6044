import { describe, expect, it } from 'vitest';
import { roundByError, roundError, withError } from './round-by-error.ts';

describe('rounding by the error', () => {
  it('keeps the value to the second digit of its error', () => {
    expect([roundByError(13.5432, 2.912), roundError(2.912)]).toEqual([13.5, 2.9]);
    expect([roundByError(0.123456, 0.00347), roundError(0.00347)]).toEqual([0.1235, 0.0035]);
    expect([roundByError(12345.6, 987), roundError(987)]).toEqual([12350, 990]);
  });

  it('carries an error that rounds up to the next decade', () => {
    expect([roundByError(5.4321, 0.0996), roundError(0.0996)]).toEqual([5.43, 0.1]);
    expect(withError(5.4321, 0.0996)).toBe('5.43 ± 0.10');
  });

  it('writes both to the same place, and nothing that is not known', () => {
    expect(withError(65.012, 2.93)).toBe('65.0 ± 2.9');
    expect(withError(65.0123, null)).toBe('65.01');
    expect(withError(null, 3)).toBeNull();
    expect(roundByError(NaN, 1)).toBeNull();
    expect(roundError(0)).toBeNull();
  });
});
