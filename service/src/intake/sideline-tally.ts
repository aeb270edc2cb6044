import type { IntakeCheck, SidelinedRow } from '@eremite/shared/contracts/intake';

/** Counts rows put aside by reason, keeping the first of each; memory does not grow with their number. */
export class SidelineTally {
  count = 0;
  private readonly reasons = new Map<string, { count: number; first: SidelinedRow[] }>();

  constructor(private readonly firstOfEach = 5) {}

  add(row: SidelinedRow): void {
    this.count++;
    const seen = this.reasons.get(row.reason);
    if (!seen) this.reasons.set(row.reason, { count: 1, first: [row] });
    else {
      seen.count++;
      if (seen.first.length < this.firstOfEach) seen.first.push(row);
    }
  }

  /** Commonest reason first. */
  summary(): IntakeCheck['reasons'] {
    return [...this.reasons]
      .map(([reason, { count, first }]) => ({ reason, count, first }))
      .sort((a, b) => b.count - a.count);
  }
}
