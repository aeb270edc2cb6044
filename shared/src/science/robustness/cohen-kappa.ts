import { DomainError } from '../domain-error.ts';

export interface Kappa {
  /** 1: always the same word; 0: no more often than by chance; NaN: not defined, both always said one and the same word. */
  readonly kappa: number;
  /** Large-sample standard error of kappa; NaN with it. */
  readonly standardError: number;
  /** Share of items on which both said the same. */
  readonly observed: number;
  /** Share expected if each had spread the own words over the items at random. */
  readonly expected: number;
}

/**
 * Agreement of two judges beyond chance, unweighted.
 *
 * @param pairs the two words on each item, in any words
 * @throws {DomainError} without an item
 *
 * Sources: kappa = (p_o - p_e)/(1 - p_e), J. Cohen (1960), Educational and Psychological Measurement 20, 37; standard error
 * for kappa other than 0, J. L. Fleiss, J. Cohen & B. S. Everitt (1969), Psychological Bulletin 72, 323, eq. 13 (equation
 * number from memory). The error is good for some tens of items and more.
 */
export function cohenKappa(pairs: readonly (readonly [string, string])[]): Kappa {
  const n = pairs.length;
  if (n === 0) throw new DomainError('cohenKappa: no item was judged by both');
  const words = [...new Set(pairs.flat())];
  const share = new Map<string, number>();
  const rows = new Map<string, number>();
  const columns = new Map<string, number>();
  const add = (map: Map<string, number>, key: string) => map.set(key, (map.get(key) ?? 0) + 1 / n);
  for (const [first, second] of pairs) {
    add(share, JSON.stringify([first, second]));
    add(rows, first);
    add(columns, second);
  }
  const cell = (i: string, j: string): number => share.get(JSON.stringify([i, j])) ?? 0;
  const row = (i: string): number => rows.get(i) ?? 0;
  const column = (j: string): number => columns.get(j) ?? 0;
  const agreed = pairs.filter(([first, second]) => first === second).length / n;
  const expected = words.reduce((sum, word) => sum + row(word) * column(word), 0);
  // Only where both always said one word; rounding must not make a number of it.
  if (words.length === 1) return { kappa: NaN, standardError: NaN, observed: agreed, expected: 1 };
  const kappa = (agreed - expected) / (1 - expected);
  let diagonal = 0;
  let beside = 0;
  for (const i of words) {
    diagonal += cell(i, i) * (1 - (row(i) + column(i)) * (1 - kappa)) ** 2;
    for (const j of words) if (i !== j) beside += cell(i, j) * (column(i) + row(j)) ** 2;
  }
  const variance =
    (diagonal + (1 - kappa) ** 2 * beside - (kappa - expected * (1 - kappa)) ** 2) / (n * (1 - expected) ** 2);
  return { kappa, standardError: Math.sqrt(Math.max(0, variance)), observed: agreed, expected };
}
