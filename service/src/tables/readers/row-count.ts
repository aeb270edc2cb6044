import { TableError, type TableFacts } from '../table.ts';

/** @throws TableError when a table has not the number of rows its head promises. */
export function checkRowCount(facts: TableFacts, rows: number, byte: number): void {
  if (facts.declaredRows === null || facts.declaredRows === rows) return;
  const message = `The table promises ${facts.declaredRows} rows and has ${rows}.`;
  throw new TableError('row-count', message, 'Fetch the table again, or correct the number in its head.', { byte });
}
