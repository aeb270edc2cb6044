import { describe, expect, it } from 'vitest';
import { crowdingChance } from './faint-excess.ts';

describe('a crowd of faint objects', () => {
  it('has the binomial chance, by hand', () => {
    // All three of three inside a quarter of the area: (1/4)^3. None: certain. One or more of two: 1 - (3/4)^2.
    expect(crowdingChance(3, 0, 3)).toBeCloseTo(1 / 64, 12);
    expect(crowdingChance(0, 7, 3)).toBe(1);
    expect(crowdingChance(1, 1, 3)).toBeCloseTo(1 - 9 / 16, 12);
  });

  it('is not unusual where the ring is as crowded, and is where it is empty', () => {
    expect(crowdingChance(6, 48, 8)).toBeGreaterThan(0.4);
    expect(crowdingChance(6, 8, 8)).toBeLessThan(0.003);
  });

  it('refuses numbers that make no sense', () => {
    expect(() => crowdingChance(-1, 3, 8)).toThrow('crowdingChance');
    expect(() => crowdingChance(1, 3, 0)).toThrow('crowdingChance');
  });
});
