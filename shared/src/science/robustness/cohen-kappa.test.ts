import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { cohenKappa } from './cohen-kappa.ts';

/** The pairs of a contingency table: counts[i][j] items called i by the one and j by the other. */
const pairsOf = (counts: readonly (readonly number[])[]): [string, string][] =>
  counts.flatMap((row, i) =>
    row.flatMap((n, j) => Array.from({ length: n }, (): [string, string] => [`${i}`, `${j}`])),
  );

describe('the agreement of two reviewers', () => {
  it('is (p_o - p_e)/(1 - p_e), Cohen (1960): 20, 5, 10, 15 give 0.70, 0.50 and 0.40 (by hand)', () => {
    const { kappa, observed, expected } = cohenKappa(
      pairsOf([
        [20, 5],
        [10, 15],
      ]),
    );
    expect(observed).toBeCloseTo(0.7, 12);
    expect(expected).toBeCloseTo(0.5, 12);
    expect(kappa).toBeCloseTo(0.4, 12);
  });

  it('counts three words as the table of Fleiss, Levin & Paik (from memory) has them: 0.89, 0.66, 0.676', () => {
    const { kappa, observed, expected } = cohenKappa(
      pairsOf([
        [75, 1, 4],
        [5, 4, 1],
        [0, 0, 10],
      ]),
    );
    expect(observed).toBeCloseTo(0.89, 12);
    expect(expected).toBeCloseTo(0.66, 12);
    expect(kappa).toBeCloseTo(0.23 / 0.34, 12);
  });

  it('is 1 where all words are the same and 0 where they are as often as by chance', () => {
    expect(
      cohenKappa(
        pairsOf([
          [3, 0],
          [0, 4],
        ]),
      ),
    ).toMatchObject({ kappa: 1, standardError: 0 });
    expect(
      cohenKappa(
        pairsOf([
          [4, 4],
          [4, 4],
        ]),
      ).kappa,
    ).toBeCloseTo(0, 12);
  });

  it('is not defined where both always said one and the same word', () => {
    expect(
      cohenKappa([
        ['dark', 'dark'],
        ['dark', 'dark'],
      ]),
    ).toEqual({
      kappa: NaN,
      standardError: NaN,
      observed: 1,
      expected: 1,
    });
    expect(() => cohenKappa([])).toThrow(DomainError);
  });

  it.each([
    {
      counts: [
        [20, 5],
        [10, 15],
      ],
    },
    {
      counts: [
        [75, 1, 4],
        [5, 4, 1],
        [0, 0, 10],
      ],
    },
    {
      counts: [
        [7, 3, 0, 1],
        [2, 9, 1, 0],
        [1, 0, 4, 2],
        [0, 1, 0, 5],
      ],
    },
  ])('has the error that the multinomial covariance gives by numerical derivatives: $counts', ({ counts }) => {
    const n = counts.flat().reduce((a, b) => a + b, 0);
    const p = counts.map((row) => row.map((value) => value / n));
    const kappaOf = (q: readonly (readonly number[])[]): number => {
      const total = q.flat().reduce((a, b) => a + b, 0);
      const at = (i: number, j: number) => q[i]![j]! / total;
      let observed = 0;
      let expected = 0;
      q.forEach((row, i) => {
        observed += at(i, i);
        expected += row.reduce((s, _, j) => s + at(i, j), 0) * q.reduce((s, _, j) => s + at(j, i), 0);
      });
      return (observed - expected) / (1 - expected);
    };
    const step = 1e-6;
    const slope = p.map((row, i) =>
      row.map((_, j) => {
        const moved = (by: number) => p.map((r, a) => r.map((v, b) => (a === i && b === j ? v + by : v)));
        return (kappaOf(moved(step)) - kappaOf(moved(-step))) / (2 * step);
      }),
    );
    // Var = (sum p g^2 - (sum p g)^2) / n
    const mean = p.flatMap((row, i) => row.map((v, j) => v * slope[i]![j]!)).reduce((a, b) => a + b, 0);
    const square = p.flatMap((row, i) => row.map((v, j) => v * slope[i]![j]! ** 2)).reduce((a, b) => a + b, 0);
    const error = Math.sqrt((square - mean ** 2) / n);
    expect(cohenKappa(pairsOf(counts)).standardError).toBeCloseTo(error, 7);
  });
});
