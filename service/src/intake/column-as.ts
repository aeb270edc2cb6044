import { TextColumn } from '../tables/columns/text-column.ts';
import { NumberColumn } from '../tables/columns/number-column.ts';
import type { ColumnData } from '../tables/table.ts';
import { cellAt } from './sample.ts';

/** A column as text or as numbers, whichever the table has elsewhere; no cell loses what it says. */
export function columnAs(data: ColumnData, rows: number, asText: boolean): ColumnData {
  if ((data.kind === 'text') === asText) return data;
  const column = asText ? new TextColumn(rows) : new NumberColumn(rows);
  for (let i = 0; i < rows; i++) {
    const cell = cellAt(data, i);
    if (cell === '') column.putMissing(i);
    else column.putText(i, cell);
  }
  return column.take(rows);
}
