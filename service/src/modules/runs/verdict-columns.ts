import { SHORTLIST_COLUMNS, VERDICT_COLUMNS, type VerdictLine } from '../../edition/columns/verdict-columns.ts';
import { type TableAnswer, tableOf } from '../../edition/columns/table-column.ts';

/** Verdicts as a table for people and programs: the same numbers, rounding and words as on the screen. */
export function verdictTable(
  lines: Iterable<VerdictLine> | AsyncIterable<VerdictLine>,
  description: string,
  ranked = false,
): TableAnswer {
  return tableOf(ranked ? SHORTLIST_COLUMNS : VERDICT_COLUMNS, lines, description);
}
