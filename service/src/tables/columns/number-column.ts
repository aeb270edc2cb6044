import type { ColumnData } from '../table.ts';
import { cellText } from './cell-text.ts';
import { isMissingWord } from './missing-marks.ts';
import { formOfLast, parsePlainNumber } from './plain-number.ts';
import { SHORTEST, SPELLED, type WrittenForm, wordForm } from './written-form.ts';

/** 2^53 rounded down: whole numbers beyond it may lose digits in a double. */
const SAFE = 9e15;

export interface NumberColumnOptions {
  /** Stored value declared as null by the file. */
  nullMark?: string;
  decimalComma?: boolean;
  /** Reads 1.5D+03 as FORTRAN programs write it, and 0x1F as VOTable allows. */
  lenient?: boolean;
  /** The file declares floating-point numbers, so that no digits of an identifier can be lost. */
  isFloat?: boolean;
}

/** Collects one column of numbers. */
export class NumberColumn {
  private values: Float64Array;
  private odd: Map<number, string> | undefined;
  private forms: Uint8Array | undefined;
  private spelled: Map<number, string> | undefined;
  private readonly nullValue: number;
  private readonly decimal: number;

  constructor(
    private readonly capacity: number,
    private readonly options: NumberColumnOptions = {},
  ) {
    this.values = new Float64Array(capacity);
    this.nullValue = options.nullMark === undefined ? NaN : Number(options.nullMark);
    this.decimal = options.decimalComma ? 44 : 46;
  }

  get textBytes(): number {
    return 0;
  }

  /** Takes a cell without surrounding blanks. */
  putCell(row: number, bytes: Buffer, start: number, end: number): void {
    const value = start === end ? NaN : parsePlainNumber(bytes, start, end, this.decimal);
    const second = bytes[start + 1]!;
    const identifier = bytes[start] === 48 && end - start > 2 && second >= 48 && second <= 57;
    if (value < SAFE && value > -SAFE && value !== this.nullValue && !identifier) {
      this.values[row] = value;
      const form = formOfLast();
      if (form !== SHORTEST) this.write(row, form, bytes, start, end);
    } else if (start === end) this.values[row] = NaN;
    else this.putOddCell(row, value, cellText(bytes, start, end));
  }

  /** Takes a value that is a number already; an infinity becomes odd. */
  putNumber(row: number, value: number): void {
    if (value === this.nullValue) this.values[row] = NaN;
    else if (value === Infinity || value === -Infinity) this.keep(row, NaN, String(value));
    else this.values[row] = value;
  }

  /** Takes a whole number of 64 bits. */
  putBigInt(row: number, value: bigint): void {
    const near = Number(value);
    if (String(value) === this.options.nullMark) this.values[row] = NaN;
    else if (near < SAFE && near > -SAFE) this.values[row] = near;
    else this.keep(row, near, String(value));
  }

  putText(row: number, text: string): void {
    const bytes = Buffer.from(text.trim());
    this.putCell(row, bytes, 0, bytes.length);
  }

  putMissing(row: number): void {
    this.values[row] = NaN;
  }

  /** Hands over the first `rows` cells and starts afresh. */
  take(rows: number): ColumnData {
    const values = rows === this.capacity ? this.values : this.values.slice(0, rows);
    if (rows === this.capacity) this.values = new Float64Array(this.capacity);
    const { odd, forms, spelled } = this;
    this.odd = this.forms = this.spelled = undefined;
    return {
      kind: 'number',
      values,
      ...(odd && { odd }),
      ...(forms && { forms: rows === this.capacity ? forms : forms.slice(0, rows) }),
      ...(spelled && { spelled }),
    };
  }

  private write(row: number, form: WrittenForm, bytes: Buffer, start: number, end: number): void {
    (this.forms ??= new Uint8Array(this.capacity))[row] = form;
    if (form === SPELLED) (this.spelled ??= new Map()).set(row, cellText(bytes, start, end));
  }

  private spell(row: number, form: WrittenForm, text: string): void {
    if (form === SHORTEST) return;
    (this.forms ??= new Uint8Array(this.capacity))[row] = form;
    if (form === SPELLED) (this.spelled ??= new Map()).set(row, text);
  }

  private putOddCell(row: number, value: number, text: string): void {
    if (text === this.options.nullMark || value === this.nullValue) this.values[row] = NaN;
    else if (isMissingWord(text)) {
      this.values[row] = NaN;
      this.spell(row, wordForm(text), text);
    } else if (Number.isFinite(value)) {
      const losesDigits =
        !this.options.isFloat && /^[+-]?\d+$/.test(text) && (/^0\d\d/.test(text) || !Number.isSafeInteger(value));
      if (losesDigits) this.keep(row, value, text);
      else {
        this.values[row] = value;
        this.spell(row, formOfLast(), text);
      }
    } else {
      const read = this.rescue(text);
      if (Number.isFinite(read)) {
        this.putNumber(row, read);
        this.spell(row, SPELLED, text);
      } else this.keep(row, NaN, text);
    }
  }

  /** Other spellings of a number: the typographic minus, and what FORTRAN and VOTable write. */
  private rescue(text: string): number {
    const ascii = text.replace(/^[\u2212\u2013]/, '-').replace(/([eE])\u2212/, '$1-');
    const spelled = this.options.lenient
      ? ascii.replace(/[dD]/, 'e').replace(/^(\+?[\d.]+)([+-]\d+)$/, '$1e$2')
      : ascii;
    const bytes = Buffer.from(spelled);
    const value = bytes.length === 0 ? NaN : parsePlainNumber(bytes, 0, bytes.length, this.decimal);
    if (Number.isFinite(value) || !this.options.lenient) return value;
    return /^0x[\da-f]+$/i.test(text) ? Number(text) : NaN;
  }

  private keep(row: number, value: number, text: string): void {
    this.values[row] = value;
    (this.odd ??= new Map()).set(row, text);
  }
}
