import type { runDifference } from '@eremite/shared/contracts/run';
import type { z } from 'zod';

export interface VerdictSummary {
  detectionId: string;
  name: string;
  starlight: string;
  surroundings: string;
  pNone: number;
  pMissed: number;
  power: number | null;
  pAlone: number | null;
  distanceMpc: number | null;
  counterpart: string | null;
  nearest: string | null;
}
type Difference = z.output<typeof runDifference>;

/** Leaves of a settings object as `section.key`. */
function leaves(settings: unknown, prefix = ''): Map<string, unknown> {
  const found = new Map<string, unknown>();
  for (const [key, value] of Object.entries((settings ?? {}) as object)) {
    if (value !== null && typeof value === 'object' && !Array.isArray(value)) {
      for (const [path, leaf] of leaves(value, `${prefix}${key}.`)) found.set(path, leaf);
    } else found.set(prefix + key, value);
  }
  return found;
}

export function changedKeys(from: unknown, to: unknown): Difference['criteriaChanged'] {
  const before = leaves(from);
  const after = leaves(to);
  return [...new Set([...before.keys(), ...after.keys()])]
    .filter((key) => JSON.stringify(before.get(key)) !== JSON.stringify(after.get(key)))
    .map((key) => ({ key, from: before.get(key) ?? null, to: after.get(key) ?? null }));
}

const number = (value: number | null, digits: number): string => (value === null ? 'none' : value.toFixed(digits));
const moved = (a: number | null, b: number | null, by: number): boolean =>
  (a === null) !== (b === null) || Math.abs((a ?? 0) - (b ?? 0)) > by;

/** What moved between two verdicts on one detection, in sentences. */
export function whyChanged(from: VerdictSummary, to: VerdictSummary): string[] {
  const why: string[] = [];
  if (from.counterpart !== to.counterpart)
    why.push(`best object ${from.counterpart ?? 'none'} -> ${to.counterpart ?? 'none'}`);
  if (moved(from.power, to.power, 0.002)) why.push(`power ${number(from.power, 3)} -> ${number(to.power, 3)}`);
  if (moved(from.distanceMpc, to.distanceMpc, 0.05))
    why.push(`distance ${number(from.distanceMpc, 1)} -> ${number(to.distanceMpc, 1)} Mpc`);
  if (from.nearest !== to.nearest) why.push(`nearest neighbour ${from.nearest ?? 'none'} -> ${to.nearest ?? 'none'}`);
  if (moved(from.pNone, to.pNone, 0.005)) why.push(`P(none) ${number(from.pNone, 2)} -> ${number(to.pNone, 2)}`);
  if (moved(from.pAlone, to.pAlone, 0.005))
    why.push(`P(no neighbour) ${number(from.pAlone, 2)} -> ${number(to.pAlone, 2)}`);
  return why;
}

/**
 * Detections whose verdict words differ, or whose P(none) moved by more than a hundredth.
 *
 * @param causesOf which changed inputs can have moved a detection
 */
export function compareVerdicts(
  from: readonly VerdictSummary[],
  to: readonly VerdictSummary[],
  causesOf: (detectionId: string) => string[] = () => [],
): Pick<Difference, 'changed' | 'unchanged'> {
  const before = new Map(from.map((row) => [row.detectionId, row]));
  const after = new Map(to.map((row) => [row.detectionId, row]));
  const changed: Difference['changed'] = [];
  let unchanged = 0;
  for (const id of new Set([...after.keys(), ...before.keys()])) {
    const a = before.get(id);
    const b = after.get(id);
    const same =
      a && b && a.starlight === b.starlight && a.surroundings === b.surroundings && !moved(a.pNone, b.pNone, 0.01);
    if (same) unchanged += 1;
    else {
      changed.push({
        detectionId: id,
        name: (b ?? a)!.name,
        starlight: [a?.starlight ?? null, b?.starlight ?? null],
        surroundings: [a?.surroundings ?? null, b?.surroundings ?? null],
        pNone: [a?.pNone ?? null, b?.pNone ?? null],
        why: a && b ? whyChanged(a, b) : [a ? 'not in the later run' : 'not in the earlier run'],
        causes: causesOf(id),
      });
    }
  }
  return { changed, unchanged };
}
