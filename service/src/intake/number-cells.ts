import type { ColumnData, RowChunk } from '../tables/table.ts';
import { isMissingWord } from '../tables/columns/missing-marks.ts';
import type { CellTally } from './cell-tally.ts';
import { cellAt } from './sample.ts';
import type { Conversion } from './units.ts';

/** Marks for "missing" that a person declared: as text and, where they are numbers, as numbers. */
export class MissingMarks {
  readonly texts: ReadonlySet<string>;
  readonly numbers: readonly number[];

  constructor(declared: readonly string[]) {
    this.texts = new Set(declared.map((mark) => mark.trim()));
    this.numbers = [...this.texts]
      .filter((mark) => mark !== '')
      .map(Number)
      .filter(Number.isFinite);
  }

  holdsText(text: string): boolean {
    return this.texts.has(text) || isMissingWord(text);
  }
}

/** How the cells of one role's column become numbers in the canonical unit. */
export interface NumberRecipe {
  index: number;
  column: string;
  /** Of the role, for sentences. */
  says: string;
  conversion: Conversion;
  /** In the canonical unit; outside is missing. */
  range: readonly [number, number];
  /** Words with a value, as "star" for a probability of 1. */
  words?: Readonly<Record<string, number>>;
}

export const rowOf = (chunk: RowChunk, i: number): number => chunk.rowNumbers?.[i] ?? chunk.firstRow + i;
export const lineOf = (chunk: RowChunk, i: number): number | null => chunk.lines?.[i] ?? null;

/** Numbers the trade writes for "no value"; other numbers out of range are said to be bad. */
const SENTINEL = /^-?9+(\.[09]*)?$|^0$|^-1$|^-?32768$|e\+?[12356]\d$/;

/**
 * Numbers of one column of a chunk, in the canonical unit, NaN where missing; the chunk's own where they are that
 * already, so that they must not be changed. Cells that are no number, or no value
 * of the role, are missing too and counted in the tally. The rule of a curved conversion is applied here except where
 * it needs other columns.
 *
 * @param limits filled with 1 where the cell is written as a limit (">22.5", "<0.3"), if given
 */
export function numberCells(
  chunk: RowChunk,
  recipe: NumberRecipe,
  marks: MissingMarks,
  tally: CellTally,
  limits?: Uint8Array,
): Float64Array {
  const data = chunk.columns[recipe.index]!;
  if (data.kind === 'number' && fits(data, chunk.rows, recipe, marks)) return data.values;
  const raw = rawNumbers(chunk, data, recipe, marks, tally, limits);
  return converted(chunk, raw, recipe, tally);
}

/** Whether every cell is a plain number of the role in its canonical unit, or empty. */
function fits(
  { values, odd }: Extract<ColumnData, { kind: 'number' }>,
  rows: number,
  { conversion, range }: NumberRecipe,
  marks: MissingMarks,
): boolean {
  if (odd?.size || values.length !== rows || marks.numbers.length > 0) return false;
  if (conversion.factor !== 1 || conversion.rule !== undefined) return false;
  const [low, high] = range;
  for (let i = 0; i < rows; i++) if (values[i]! < low || values[i]! > high) return false;
  return true;
}

function rawNumbers(
  chunk: RowChunk,
  data: ColumnData,
  recipe: NumberRecipe,
  marks: MissingMarks,
  tally: CellTally,
  limits: Uint8Array | undefined,
): Float64Array {
  const { rows } = chunk;
  const fromText = (i: number, text: string): number => {
    const plain = text.trim();
    if (marks.holdsText(plain)) return NaN;
    const limit = /^([<>])=?\s*(.+)$/.exec(plain);
    if (limit && limits) limits[i] = 1;
    const value = wordOrNumber(limit && limits ? limit[2]! : plain, recipe.words);
    if (Number.isNaN(value))
      tally.refuse(recipe.column, `are not a ${recipe.says}`, rowOf(chunk, i), lineOf(chunk, i), plain);
    return marks.numbers.includes(value) ? NaN : value;
  };
  if (data.kind === 'text') {
    const values = new Float64Array(rows);
    for (let i = 0; i < rows; i++)
      values[i] = data.offsets[i] === data.offsets[i + 1] ? NaN : fromText(i, cellAt(data, i));
    return values;
  }
  const values = data.values.slice(0, rows);
  for (const [i, text] of data.odd ?? []) if (Number.isNaN(values[i]!)) values[i] = fromText(i, text);
  for (const mark of marks.numbers) {
    for (let i = 0; i < rows; i++) if (values[i] === mark) values[i] = NaN;
  }
  return values;
}

function wordOrNumber(text: string, words: NumberRecipe['words']): number {
  const plain = text.replace(/[\u2212\u2010-\u2014]/g, '-').replace(/^\+/, '');
  const value = plain === '' ? NaN : Number(plain);
  if (!Number.isNaN(value)) return Number.isFinite(value) ? value : NaN;
  return words?.[text.toLowerCase()] ?? NaN;
}

/** Applies factor, rule and range in place. */
function converted(chunk: RowChunk, values: Float64Array, recipe: NumberRecipe, tally: CellTally): Float64Array {
  const { factor, rule } = recipe.conversion;
  const [low, high] = recipe.range;
  for (let i = 0; i < values.length; i++) {
    const given = values[i]!;
    if (Number.isNaN(given)) continue;
    let value = given * factor;
    if (rule === 'distanceModulus') value = given > -5 && given < 60 ? 10 ** (given / 5 - 5) : NaN;
    else if (rule === 'log10') value = given < 20 ? 10 ** given : NaN;
    else if (rule === 'abFromFlux') value = given > 0 ? -2.5 * Math.log10(value / 3631) : NaN;
    if (value >= low && value <= high) values[i] = value;
    else {
      values[i] = NaN;
      const text = String(given);
      if (SENTINEL.test(text)) tally.mark(recipe.column, rowOf(chunk, i), lineOf(chunk, i), text);
      else {
        const why = `hold a number that is no ${recipe.says} and count as missing`;
        tally.refuse(recipe.column, why, rowOf(chunk, i), lineOf(chunk, i), text);
      }
    }
  }
  return values;
}
