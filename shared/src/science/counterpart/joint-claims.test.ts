import { describe, expect, it } from 'vitest';
import { jointClaimFactors } from './joint-claims.ts';

/** Posterior of a key after the factors, from the posterior alone. */
function joint(alone: Record<string, number>, factors: Map<string, number>): Record<string, number> {
  const free = 1 - Object.values(alone).reduce((sum, p) => sum + p, 0);
  const weights = Object.entries(alone).map(([key, p]) => [key, p * factors.get(key)!] as const);
  const total = weights.reduce((sum, [, weight]) => sum + weight, free);
  return Object.fromEntries(weights.map(([key, weight]) => [key, weight / total]));
}
const claimant = (claims: Record<string, number>) => ({ claims: new Map(Object.entries(claims)) });

describe('one galaxy claimed by several detections', () => {
  it('stays as it was with one claimant', () => {
    const [factors] = jointClaimFactors([claimant({ a: 0.7, b: 0.2 })]);
    expect([...factors!.values()].map((x) => x.toFixed(12))).toEqual(['1.000000000000', '1.000000000000']);
  });

  it('is shared evenly by two that claim it alike', () => {
    // By hand: of both (0.81, not allowed), one (0.09 each) and neither (0.01) remain 0.09/0.19 each.
    const [first, second] = jointClaimFactors([claimant({ a: 0.9 }), claimant({ a: 0.9 })]);
    expect(joint({ a: 0.9 }, first!)['a']).toBeCloseTo(0.09 / 0.19, 12);
    expect(joint({ a: 0.9 }, second!)['a']).toBeCloseTo(0.09 / 0.19, 12);
  });

  it('goes to the better claim, and the sum over claimants never passes one', () => {
    const [strong, weak] = jointClaimFactors([claimant({ a: 0.999 }), claimant({ a: 0.8 })]);
    const [p, q] = [joint({ a: 0.999 }, strong!)['a']!, joint({ a: 0.8 }, weak!)['a']!];
    expect(p).toBeCloseTo((0.999 * 0.2) / (1 - 0.999 * 0.8), 12);
    expect(p).toBeGreaterThan(0.99);
    expect(p + q).toBeLessThanOrEqual(1);
  });

  it('pushes a detection to its second galaxy where the first is taken', () => {
    const [, second] = jointClaimFactors([claimant({ a: 0.999 }), claimant({ a: 0.6, b: 0.39 })]);
    const after = joint({ a: 0.6, b: 0.39 }, second!);
    expect(after['b']).toBeGreaterThan(0.95);
  });

  it('gives what a sum over all assignments gives, for three detections and three galaxies', () => {
    const alone = [
      { a: 0.5, b: 0.3, c: 0.1 },
      { a: 0.2, b: 0.7 },
      { b: 0.4, c: 0.55 },
    ] as Record<string, number>[];
    const sums = alone.map(() => ({}) as Record<string, number>);
    let total = 0;
    for (const x of ['a', 'b', 'c', '-'])
      for (const y of ['a', 'b', '-'])
        for (const z of ['b', 'c', '-']) {
          const used = [x, y, z].filter((key) => key !== '-');
          if (new Set(used).size < used.length) continue;
          const weight = [x, y, z].reduce((product, key, i) => {
            const rest = 1 - Object.values(alone[i]!).reduce((sum, p) => sum + p, 0);
            return product * (key === '-' ? rest : alone[i]![key]!);
          }, 1);
          total += weight;
          [x, y, z].forEach((key, i) => (sums[i]![key] = (sums[i]![key] ?? 0) + weight));
        }
    const factors = jointClaimFactors(alone.map(claimant));
    alone.forEach((claims, i) => {
      const after = joint(claims, factors[i]!);
      for (const key of Object.keys(claims)) expect(after[key]).toBeCloseTo(sums[i]![key]! / total, 12);
    });
  });

  it('leaves the least claims out where there are too many to count', () => {
    const crowd = Array.from({ length: 10 }, (_, i) =>
      claimant({ [`own${i}`]: 0.5, shared: 0.3, [`faint${i}`]: 0.001 }),
    );
    const factors = jointClaimFactors(crowd);
    expect(factors[0]!.get('faint0')).toBe(1);
    expect(factors[0]!.get('shared')!).toBeLessThan(1);
  });
});
