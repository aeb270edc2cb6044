import type { ChartAxis } from './chart.ts';

/** Probabilities nearer to 0 or 1 are drawn here: draws and priors are no better. */
const LEAST = 0.0005;

/** Log odds: spreads both ends, where verdicts are made. @param p in [0, 1] */
export function logit(p: number): number {
  const inside = Math.min(1 - LEAST, Math.max(LEAST, p));
  return Math.log(inside / (1 - inside));
}

/** The probability of some log odds. */
export const probabilityOf = (odds: number): number => 1 / (1 + Math.exp(-odds));

export const PROBABILITY_TICKS = [0.001, 0.01, 0.1, 0.5, 0.9, 0.99, 0.999];
export const ODDS_RANGE = [logit(0), logit(1)] as const;

export const probabilityAxis = (label: string, value: ChartAxis['value']): ChartAxis => ({
  label,
  value: (point) => {
    const p = value(point);
    return p === null ? null : logit(p);
  },
  toText: (odds) => String(Number(probabilityOf(odds).toPrecision(3))),
  fromText: (text) => logit(Number(text)),
});
