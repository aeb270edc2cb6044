import { type Column, type PackedColumns, type TextColumn, textAt, textColumn } from './column-pack.ts';

/** Text of an original cell: a number by its shortest digits, '' where missing. */
export function cellText(column: Column, i: number): string {
  if ('kind' in column) return textAt(column, i);
  const value = column[i]!;
  return Number.isNaN(value) ? '' : Object.is(value, -0) ? '-0' : String(value);
}

/** All cells of one row, in column order. */
export function rowCells(table: PackedColumns, i: number): string[] {
  return Object.values(table.columns).map((column) => cellText(column, i));
}

/**
 * Makes every column of the tables of one type, so that they can be joined: where one chunk of a column holds text
 * (a cell that is no plain number), the others become text too.
 */
export function alike(tables: readonly PackedColumns[]): PackedColumns[] {
  const first = tables[0];
  if (!first) return [];
  const mixed = Object.keys(first.columns).filter((name) => {
    const texts = tables.filter((table) => 'kind' in table.columns[name]!).length;
    return texts > 0 && texts < tables.length;
  });
  if (mixed.length === 0) return [...tables];
  return tables.map(({ rows, columns }) => {
    const own: Record<string, Column> = { ...columns };
    for (const name of mixed) own[name] = asText(columns[name]!, rows);
    return { rows, columns: own };
  });
}

function asText(column: Column, rows: number): TextColumn {
  if ('kind' in column) return column;
  return textColumn(Array.from({ length: rows }, (_, i) => cellText(column, i)));
}
