import { type OutputCell, type OutputColumn, type OutputRows, type OutputTable, roundCell } from './output-column.ts';
import { utf8Pieces } from './utf8-pieces.ts';

/** Writes one JSON object: `{"table", "columns", "rows"}`, a row being an array in the order of the columns. */
export function writeJson(columns: OutputColumn[], rows: OutputRows, table: OutputTable): AsyncIterable<Uint8Array> {
  return utf8Pieces(jsonTexts(columns, rows, table));
}

async function* jsonTexts(columns: OutputColumn[], rows: OutputRows, table: OutputTable): AsyncIterable<string> {
  yield `{"table":${JSON.stringify(table)},\n"columns":${JSON.stringify(columns)},\n"rows":[`;
  let first = true;
  for await (const row of rows) {
    yield `${first ? '' : ','}\n${JSON.stringify(columns.map((column, i) => jsonCell(row[i] ?? null, column)))}`;
    first = false;
  }
  yield '\n]}\n';
}

function jsonCell(cell: OutputCell, column: OutputColumn): OutputCell {
  return typeof cell === 'number' ? roundCell(cell, column) : cell;
}
