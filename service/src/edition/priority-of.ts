import type { Priority } from '@eremite/shared/contracts/shortlist';
import type { VerdictItem } from '@eremite/shared/contracts/verdict';

/**
 * What a detection is worth a telescope's time: P(none) times P(no neighbour) times the smaller stability of its two
 * verdicts. P(none) has P(the line is real) in it, since the hypotheses exclude each other. A choice of this project.
 */
export function priorityOf({
  pNone,
  pAlone,
  robustness,
}: Pick<VerdictItem, 'pNone' | 'pAlone' | 'robustness'>): Priority {
  const shares = [robustness?.starlightStability ?? null, robustness?.surroundingsStability ?? null];
  const known = shares.filter((share) => share !== null);
  const stability = known.length === 0 ? null : Math.min(...known);
  return { pNone, pAlone, stability, value: pNone * (pAlone ?? 0) * (stability ?? 0) };
}

/** Best first; ties go to the likelier dark, then by name, so that the order never depends on the input's. */
export function byPriority(a: { priority: Priority; name: string }, b: { priority: Priority; name: string }): number {
  return b.priority.value - a.priority.value || b.priority.pNone - a.priority.pNone || (a.name < b.name ? -1 : 1);
}
