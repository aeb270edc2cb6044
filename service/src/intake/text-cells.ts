import type { RowChunk } from '../tables/table.ts';
import { type TextColumn, textColumn } from '../tiles/column-pack.ts';
import { cellAt } from './sample.ts';

/** Names of the rows as text; a number keeps every digit it was written with. */
export function nameCells(chunk: RowChunk, index: number): TextColumn {
  const data = chunk.columns[index]!;
  if (data.kind === 'text') {
    const { offsets, bytes } = data;
    const end = offsets[chunk.rows]!;
    if (offsets[0] === 0 && offsets.length === chunk.rows + 1 && end === bytes.length)
      return { kind: 'text', offsets, bytes };
    const start = offsets[0]!;
    const own = Uint32Array.from({ length: chunk.rows + 1 }, (_, i) => offsets[i]! - start);
    return { kind: 'text', offsets: own, bytes: bytes.slice(start, end) };
  }
  return textColumn(Array.from({ length: chunk.rows }, (_, i) => cellAt(data, i)));
}

/** The original cells of a column of a chunk: numbers as Float64, or as text where a cell is not plain. */
export function originalCells(chunk: RowChunk, index: number): Float64Array | TextColumn {
  const data = chunk.columns[index]!;
  if (data.kind === 'number' && !data.odd?.size && !data.spelled?.size) {
    return data.values.length === chunk.rows ? data.values : data.values.slice(0, chunk.rows);
  }
  return nameCells(chunk, index);
}

/** How the numbers of a column were written, a byte a cell; undefined where all are as their shortest digits. */
export function originalForms(chunk: RowChunk, index: number): Uint8Array | undefined {
  const data = chunk.columns[index]!;
  return data.kind === 'number' && data.forms ? data.forms.subarray(0, chunk.rows) : undefined;
}
