import { DomainError } from '../domain-error.ts';

export interface Fit {
  readonly parameters: readonly number[];
  /** Sum of squared residuals over sigma squared. */
  readonly chiSquared: number;
}

export interface FitProblem {
  readonly x: ArrayLike<number>;
  readonly y: ArrayLike<number>;
  /** Standard deviation of every y. */
  readonly sigma: number;
  readonly model: (x: number, parameters: readonly number[]) => number;
  readonly start: readonly number[];
  /** Step of each parameter for the numerical derivative. */
  readonly steps: readonly number[];
}

const MOST_ROUNDS = 60;

/**
 * Weighted least squares by the method of Levenberg and Marquardt with a numerical derivative.
 *
 * @returns the best parameters found from `start`: a local minimum
 * @throws {DomainError} for a sigma that is not positive or fewer points than parameters
 *
 * Source: Marquardt (1963), SIAM J. Appl. Math. 11, 431.
 */
export function leastSquares({ x, y, sigma, model, start, steps }: FitProblem): Fit {
  const count = x.length;
  const size = start.length;
  if (!(sigma > 0)) throw new DomainError(`leastSquares: sigma must be positive, got ${sigma}`);
  if (count < size) throw new DomainError(`leastSquares: ${count} points cannot fix ${size} parameters`);
  const cost = (p: readonly number[]) => {
    let sum = 0;
    for (let i = 0; i < count; i++) sum += ((y[i]! - model(x[i]!, p)) / sigma) ** 2;
    return Number.isFinite(sum) ? sum : Infinity;
  };
  let parameters = [...start];
  let best = cost(parameters);
  let damping = 1e-2;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const { normal, slope } = normalEquations(parameters);
    let gained = 0;
    while (damping < 1e12) {
      const damped = normal.map((row, i) => row.map((v, j) => (i === j ? v * (1 + damping) + 1e-30 : v)));
      const step = solve(damped, slope);
      const tried = step && parameters.map((p, i) => p + step[i]!);
      const reached = tried ? cost(tried) : Infinity;
      if (reached < best) {
        gained = best - reached;
        best = reached;
        parameters = tried!;
        damping = Math.max(1e-9, damping / 9);
        break;
      }
      damping *= 7;
    }
    if (gained < 1e-6 * Math.max(1, best)) break;
  }
  return { parameters, chiSquared: best };

  function normalEquations(p: readonly number[]) {
    const normal = Array.from({ length: size }, () => new Array<number>(size).fill(0));
    const slope = new Array<number>(size).fill(0);
    const gradient = new Array<number>(size).fill(0);
    const moved = steps.map((step, k) => p.map((value, i) => (i === k ? value + step : value)));
    for (let i = 0; i < count; i++) {
      const here = model(x[i]!, p);
      for (let k = 0; k < size; k++) gradient[k] = (model(x[i]!, moved[k]!) - here) / steps[k]! / sigma;
      const residual = (y[i]! - here) / sigma;
      for (let j = 0; j < size; j++) {
        slope[j]! += gradient[j]! * residual;
        for (let k = 0; k < size; k++) normal[j]![k]! += gradient[j]! * gradient[k]!;
      }
    }
    return { normal, slope };
  }
}

/** Gaussian elimination with pivoting; undefined for a singular matrix. */
export function solve(matrix: readonly (readonly number[])[], right: readonly number[]): number[] | undefined {
  const size = right.length;
  const rows = matrix.map((row, i) => [...row, right[i]!]);
  for (let column = 0; column < size; column++) {
    let pivot = column;
    for (let r = column + 1; r < size; r++) {
      if (Math.abs(rows[r]![column]!) > Math.abs(rows[pivot]![column]!)) pivot = r;
    }
    const lead = rows[pivot]![column]!;
    if (!Number.isFinite(lead) || lead === 0) return undefined;
    [rows[column], rows[pivot]] = [rows[pivot]!, rows[column]!];
    for (let r = column + 1; r < size; r++) {
      const factor = rows[r]![column]! / lead;
      for (let k = column; k <= size; k++) rows[r]![k]! -= factor * rows[column]![k]!;
    }
  }
  const answer = new Array<number>(size).fill(0);
  for (let r = size - 1; r >= 0; r--) {
    let sum = rows[r]![size]!;
    for (let k = r + 1; k < size; k++) sum -= rows[r]![k]! * answer[k]!;
    answer[r] = sum / rows[r]![r]!;
  }
  return answer;
}
