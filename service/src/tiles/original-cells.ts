import { SHORTEST, writtenText } from '../tables/columns/written-form.ts';
import { type Column, type PackedColumns, type TextColumn, textAt, textColumn } from './column-pack.ts';

/** Name of the column, a byte a row, that tells how the numbers of an original column were written. */
export const formsName = (name: string): string => `${name}${FORMS}`;
const FORMS = ':form';

/** Text of an original cell as it was written; '' where missing. */
export function cellText(column: Column, i: number, forms?: Column): string {
  if ('kind' in column) return textAt(column, i);
  return writtenText(column[i]!, forms && !('kind' in forms) ? forms[i]! : SHORTEST);
}

/** All cells of one row, in column order. */
export function rowCells({ columns }: PackedColumns, i: number): string[] {
  const cells: string[] = [];
  for (const [name, column] of Object.entries(columns)) {
    if (!name.endsWith(FORMS)) cells.push(cellText(column, i, columns[formsName(name)]));
  }
  return cells;
}

/**
 * Makes every column of the tables of one type, so that they can be joined: where one chunk of a column holds text
 * (a cell that is no plain number), the others become text too; where one tells how its numbers were written, all do.
 */
export function alike(tables: readonly PackedColumns[]): PackedColumns[] {
  const names = [...new Set(tables.flatMap(({ columns }) => Object.keys(columns)))];
  const mixed = new Set(names.filter((name) => tables.some(({ columns }) => isText(columns[name]))));
  return tables.map(({ rows, columns }) => {
    const own: Record<string, Column> = {};
    for (const name of names) {
      const column = columns[name];
      if (name.endsWith(FORMS)) {
        // Text is as it was written.
        if (!mixed.has(name.slice(0, -FORMS.length))) own[name] = column ?? new Uint8Array(rows);
      } else if (column) own[name] = mixed.has(name) ? asText(column, rows, columns[formsName(name)]) : column;
    }
    return { rows, columns: own };
  });
}

const isText = (column: Column | undefined): boolean => column !== undefined && 'kind' in column;

function asText(column: Column, rows: number, forms: Column | undefined): TextColumn {
  if ('kind' in column) return column;
  return textColumn(Array.from({ length: rows }, (_, i) => cellText(column, i, forms)));
}
