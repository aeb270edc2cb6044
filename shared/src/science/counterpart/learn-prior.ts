import { DomainError } from '../domain-error.ts';

export interface LearntPrior {
  /** Lower edge of the bin, log10 of the HI mass in solar masses. */
  fromLogMass: number;
  toLogMass: number;
  detections: number;
  /** Q of the bin; the fallback where the bin has too few detections. */
  prior: number;
  learnt: boolean;
}

export interface PriorSettings {
  fallback: number;
  /** Width of a bin, dex. */
  widthDex: number;
  /** Detections a bin needs. */
  minimum: number;
  /** Detections the fallback counts for, so that a small bin does not run to 0 or 1. */
  pseudoCounts: number;
}

/** Our choice: bins of half a decade with a hundred detections or more. */
export const DEFAULT_PRIOR_LEARNING: Omit<PriorSettings, 'fallback'> = {
  widthDex: 0.5,
  minimum: 100,
  pseudoCounts: 20,
};

/**
 * Learns Q, the share of detections with a galaxy of stars, per bin of HI mass.
 *
 * @param logMass log10 of the HI mass of each detection; NaN is left out
 * @param evidence a_i = (1 - c_i) + sum of the objects' weights for prior one: how many times likelier the data are with a
 *   counterpart than without. One says nothing.
 * @param settings bins, fallback and its strength
 * @returns the bins in order, empty ones included between the first and the last
 * @throws {DomainError} if the arrays differ in length
 *
 * Expectation maximisation: Q <- mean of Q a / (Q a + 1 - Q), to 1e-6.
 *
 * Method: prior.
 */
export function learnPrior(
  logMass: ArrayLike<number>,
  evidence: ArrayLike<number>,
  settings: PriorSettings,
): LearntPrior[] {
  if (logMass.length !== evidence.length) {
    throw new DomainError(`learnPrior: ${logMass.length} masses, ${evidence.length} evidences`);
  }
  const bins = new Map<number, number[]>();
  for (let i = 0; i < logMass.length; i++) {
    const bin = Math.floor(logMass[i]! / settings.widthDex);
    if (Number.isNaN(bin) || !(evidence[i]! >= 0)) continue;
    const members = bins.get(bin);
    if (members) members.push(evidence[i]!);
    else bins.set(bin, [evidence[i]!]);
  }
  if (bins.size === 0) return [];
  const first = Math.min(...bins.keys());
  const last = Math.max(...bins.keys());
  const learnt: LearntPrior[] = [];
  for (let bin = first; bin <= last; bin++) {
    const members = bins.get(bin) ?? [];
    const enough = members.length >= settings.minimum;
    learnt.push({
      fromLogMass: bin * settings.widthDex,
      toLogMass: (bin + 1) * settings.widthDex,
      detections: members.length,
      prior: enough ? maximise(members, settings) : settings.fallback,
      learnt: enough,
    });
  }
  return learnt;
}

function maximise(evidence: readonly number[], { fallback, pseudoCounts }: PriorSettings): number {
  let prior = fallback;
  for (let step = 0; step < 500; step++) {
    let sum = pseudoCounts * fallback;
    for (const a of evidence) sum += a === Infinity ? 1 : (prior * a) / (prior * a + 1 - prior);
    const next = sum / (evidence.length + pseudoCounts);
    if (Math.abs(next - prior) < 1e-6) return next;
    prior = next;
  }
  return prior;
}

/** Q for a mass: that of its bin, or the fallback outside all bins. */
export function priorOf(bins: readonly LearntPrior[], logMass: number, fallback: number): number {
  const bin = bins.find(({ fromLogMass, toLogMass }) => logMass >= fromLogMass && logMass < toLogMass);
  return bin ? bin.prior : fallback;
}
