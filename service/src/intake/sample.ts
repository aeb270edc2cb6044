import { SHORTEST, writtenText } from '../tables/columns/written-form.ts';
import type { ColumnData, RowChunk } from '../tables/table.ts';

/** What the first rows show of one column. */
export interface ColumnSample {
  /** Rows looked at. */
  rows: number;
  /** Of those, cells that are plain numbers and not a usual mark for "missing". */
  numbers: number;
  /** Of those, cells with text that is no plain number. */
  texts: number;
  min: number;
  max: number;
  median: number;
  /** Share of the text cells that look like h:m:s or d:m:s. */
  sexagesimal: number;
}

const SEXAGESIMAL = /^\s*[+\-\u2212]?\d{1,3}\s*[:h d°]\s*\d{1,2}(\.\d+)?(\s*[:m '′]\s*\d{1,2}(\.\d+)?)?\s*[s"″]?\s*$/;
const decoder = new TextDecoder();

/** The text of a cell of any column as it was written; '' where missing. */
export function cellAt(data: ColumnData, i: number): string {
  if (data.kind === 'text') return decoder.decode(data.bytes.subarray(data.offsets[i], data.offsets[i + 1]));
  return data.odd?.get(i) ?? data.spelled?.get(i) ?? writtenText(data.values[i]!, data.forms?.[i] ?? SHORTEST);
}

/** Looks at the columns of the first chunk, at most `most` rows of it. */
export function sampleColumns(chunk: RowChunk | undefined, columns: number, most = 5000): ColumnSample[] {
  if (!chunk) return Array.from({ length: columns }, () => summary([], 0, 0, 0));
  const rows = Math.min(chunk.rows, most);
  return chunk.columns.map((data) => {
    const numbers: number[] = [];
    let texts = 0;
    let sexagesimal = 0;
    for (let i = 0; i < rows; i++) {
      if (data.kind === 'number' && !Number.isNaN(data.values[i]!)) {
        if (!isMark(data.values[i]!)) numbers.push(data.values[i]!);
        continue;
      }
      const text = cellAt(data, i).trim();
      if (text === '') continue;
      const value = Number(text);
      if (Number.isFinite(value)) {
        if (!isMark(value)) numbers.push(value);
      } else {
        texts++;
        if (SEXAGESIMAL.test(text)) sexagesimal++;
      }
    }
    return summary(numbers, texts, texts === 0 ? 0 : sexagesimal / texts, rows);
  });
}

/** Numbers written only for "no value": a column that holds mostly these is judged by the rest. */
function isMark(value: number): boolean {
  return value === -32768 || Math.abs(value) >= 1e20 || /^(-9{3,}(\.9+)?|99\.9+)$/.test(String(value));
}

function summary(numbers: number[], texts: number, sexagesimal: number, rows: number): ColumnSample {
  const sorted = Float64Array.from(numbers).sort();
  return {
    rows,
    numbers: sorted.length,
    texts,
    min: sorted[0] ?? NaN,
    max: sorted[sorted.length - 1] ?? NaN,
    median: sorted[sorted.length >> 1] ?? NaN,
    sexagesimal,
  };
}
