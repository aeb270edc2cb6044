import type { Priority } from '@eremite/shared/contracts/shortlist';
import type { VerdictItem } from '@eremite/shared/contracts/verdict';

/**
 * What a detection is worth a telescope's time: P(none) times P(no neighbour) times the smaller stability of its two
 * verdicts, and times the share of the best placed one's dark hours where a site is named. P(none) has P(the line is real) in it, since the hypotheses exclude each other. A choice of this project.
 */
export function priorityOf(
  { pNone, pAlone, robustness }: Pick<VerdictItem, 'pNone' | 'pAlone' | 'robustness'>,
  visibility: number | null = null,
): Priority {
  const shares = [robustness?.starlightStability ?? null, robustness?.surroundingsStability ?? null];
  const known = shares.filter((share) => share !== null);
  const stability = known.length === 0 ? null : Math.min(...known);
  const value = pNone * (pAlone ?? 0) * (stability ?? 0) * (visibility ?? 1);
  return { pNone, pAlone, stability, visibility, value };
}

/** Best first; ties go to the likelier dark, then by name, so that the order never depends on the input's. */
export function byPriority(a: { priority: Priority; name: string }, b: { priority: Priority; name: string }): number {
  return b.priority.value - a.priority.value || b.priority.pNone - a.priority.pNone || (a.name < b.name ? -1 : 1);
}
