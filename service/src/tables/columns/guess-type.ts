import type { ColumnType } from '../table.ts';
import { isMissingWord } from './missing-marks.ts';

const NUMBER = /^[+\-\u2212]?(\d+\.?\d*|\.\d+)([eE][+\-\u2212]?\d+)?$/;
const BOOLEAN = /^(true|false|t|f)$/i;
/** Cells that may differ from the kind of the others before the column counts as text. */
const MISFIT_SHARE = 0.1;

/** Whether a cell is a plain number, with the decimal comma if told so. */
export function isPlainNumber(cell: string, decimalComma = false): boolean {
  return NUMBER.test(decimalComma ? cell.replace(',', '.') : cell);
}

/**
 * Guesses the type of a column from some of its cells. Whole numbers that a double cannot hold, and those with leading
 * zeros (identifiers), make a column text; so does a column without any value.
 */
export function guessColumnType(cells: string[], decimalComma = false): ColumnType {
  let values = 0;
  let numbers = 0;
  let whole = 0;
  let booleans = 0;
  for (const raw of cells) {
    const cell = raw.trim();
    if (isMissingWord(cell)) continue;
    values++;
    if (BOOLEAN.test(cell)) booleans++;
    if (!isPlainNumber(cell, decimalComma)) continue;
    numbers++;
    if (!/^[+\-\u2212]?\d+$/.test(cell)) continue;
    whole++;
    if (/^0\d\d/.test(cell) || (cell.length > 15 && !Number.isSafeInteger(Number(cell)))) return 'text';
  }
  if (values === 0) return 'text';
  if (values - numbers <= values * MISFIT_SHARE) return whole === values ? 'integer' : 'number';
  return booleans === values ? 'boolean' : 'text';
}
