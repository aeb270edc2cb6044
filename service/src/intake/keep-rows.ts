import type { RowChunk } from '../tables/table.ts';
import type { Recipe } from './recipe.ts';
import { cellAt } from './sample.ts';

/** 1 for every row that the `keep` settings want, 0 for the others; undefined where all are wanted. */
export function keptRows(chunk: RowChunk, keep: Recipe['keep']): Uint8Array | undefined {
  if (keep.length === 0) return undefined;
  const wanted = new Uint8Array(chunk.rows).fill(1);
  for (const { index, texts, numbers } of keep) {
    const data = chunk.columns[index]!;
    for (let i = 0; i < chunk.rows; i++) {
      if (wanted[i] === 0) continue;
      const number = data.kind === 'number' ? data.values[i]! : NaN;
      if (numbers.has(number)) continue;
      if (!texts.has(cellAt(data, i).trim())) wanted[i] = 0;
    }
  }
  return wanted;
}
