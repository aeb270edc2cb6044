import type { OutputRow, OutputRows } from './output-column.ts';

/** Holds all rows, for formats whose head tells numbers and widths; meant for lists, not for whole catalogues. */
export async function collectRows(rows: OutputRows): Promise<OutputRow[]> {
  const held: OutputRow[] = [];
  for await (const row of rows) held.push(row);
  return held;
}
