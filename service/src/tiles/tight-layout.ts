export type Bits = 8 | 16 | 32;
export type NumberType = 'f64' | 'f32' | 'i32' | 'u32' | 'u8';

/** How a column is laid down; its arrays follow in the order of {@link partsOf}. */
export type Layout =
  | { as: 'plain'; type: NumberType }
  /** one value for all rows; null is NaN */
  | { as: 'constant'; type: NumberType; value: number | null }
  /** see tight-floats.ts */
  | { as: 'decimal'; decimals: number; from: number; bits: Bits }
  /** a bit for each row that has a value, then these values as a column of their own */
  | { as: 'sparse'; values: Layout; count: number }
  /** whole numbers less the smallest of them */
  | { as: 'offset'; type: NumberType; from: number; bits: Bits }
  /** whole numbers that do not decrease, each less the one before */
  | { as: 'step'; from: number; bits: Bits }
  /** text cells of one length */
  | { as: 'even'; width: number; bytes: number }
  /** text cells, their lengths first */
  | { as: 'text'; bits: Bits; bytes: number };

const WIDTHS = { f64: 8, f32: 4, i32: 4, u32: 4, u8: 1 } as const;

/** Elements and bytes an element of each array that a column of this layout takes. */
export function partsOf(layout: Layout, rows: number): [count: number, width: number][] {
  switch (layout.as) {
    case 'plain':
      return [[rows, WIDTHS[layout.type]]];
    case 'constant':
      return [];
    case 'sparse':
      return [[Math.ceil(rows / 8), 1], ...partsOf(layout.values, layout.count)];
    case 'even':
      return [[layout.bytes, 1]];
    case 'text':
      return [
        [rows, layout.bits / 8],
        [layout.bytes, 1],
      ];
    default:
      return [[rows, layout.bits / 8]];
  }
}

/** Whether something read back makes sense as a layout of a column of this many rows. */
export function isLayout(value: unknown, rows: number): value is Layout {
  if (typeof value !== 'object' || value === null) return false;
  const { as, type, bits, count, bytes, width, values, from, decimals } = value as Record<string, unknown>;
  const counts = (n: unknown): n is number => Number.isSafeInteger(n) && (n as number) >= 0;
  const isType = typeof type === 'string' && Object.hasOwn(WIDTHS, type);
  const isBits = bits === 8 || bits === 16 || bits === 32;
  const isFrom = Number.isSafeInteger(from);
  switch (as) {
    case 'plain':
    case 'constant':
      return isType;
    case 'decimal':
      return isBits && counts(decimals) && isFrom;
    case 'offset':
      return isType && isBits && isFrom;
    case 'step':
      return isBits && isFrom;
    case 'even':
      return counts(bytes) && counts(width) && bytes === width * rows;
    case 'text':
      return isBits && counts(bytes);
    case 'sparse':
      return counts(count) && count <= rows && isLayout(values, count) && isDoubles(values);
    default:
      return false;
  }
}

const isDoubles = (layout: Layout): boolean =>
  layout.as === 'decimal' || (layout.as === 'plain' && layout.type === 'f64');
