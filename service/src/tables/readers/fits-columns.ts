import { type ColumnFacts, type ReaderLimits, TableError } from '../table.ts';
import { uniqueNames } from './column-names.ts';
import type { FitsHdu } from './fits-hdus.ts';

/** Bytes of one element by TFORM code (FITS 4.0, Table 18); X counts bits. */
export const ELEMENT_BYTES: Record<string, number> = {
  L: 1, X: 1, B: 1, I: 2, J: 4, K: 8, A: 1, E: 4, D: 8, C: 8, M: 16, P: 8, Q: 16,
}; // prettier-ignore

/** How one column of a FITS table is stored. */
export interface FitsColumn {
  /** TFORM letter. */
  code: string;
  /** Elements in a cell, or characters of an ASCII table's field. */
  repeat: number;
  /** TFORM letter of the elements of a variable-length cell. */
  heapCode?: string;
  /** Byte of the row at which the cell begins. */
  offset: number;
  scale: number;
  zero: number;
  /** Stored value that means null, as written in the header. */
  nullMark?: string;
}

/** Bytes of `count` elements of a TFORM letter. */
export function elementBytes(code: string, count: number): number {
  return code === 'X' ? Math.ceil(count / 8) : count * ELEMENT_BYTES[code]!;
}

/** Reads the columns of a BINTABLE or TABLE header and checks them against the row length. */
export function readFitsColumns(hdu: FitsHdu, limits: ReaderLimits, notes: string[]) {
  const { header, number } = hdu;
  const width = header.count('TFIELDS', number, 0);
  if (width > limits.maxColumns) {
    throw new TableError(
      'too-many-columns',
      `HDU ${number} has ${width} columns, more than the limit of ${limits.maxColumns}.`,
      'Keep only the columns that are needed, or have the limit on columns raised.',
      { column: limits.maxColumns + 1 },
    );
  }
  const isAscii = header.text('XTENSION') === 'TABLE';
  const rowBytes = header.count('NAXIS1', number);
  const indices = Array.from({ length: width }, (_, i) => i + 1);
  const names = uniqueNames(
    indices.map((n) => header.text(`TTYPE${n}`) ?? ''),
    notes,
  );
  const columns: FitsColumn[] = [];
  let offset = 0;
  for (const n of indices) {
    const column = isAscii ? asciiColumn(hdu, n) : binaryColumn(hdu, n, offset);
    offset = column.offset + (isAscii ? column.repeat : elementBytes(column.code, column.repeat));
    if (offset > rowBytes) {
      const message = `The columns of HDU ${number} need more than the ${rowBytes} bytes of a row (NAXIS1), from ${names[n - 1]} on.`;
      throw new TableError('bad-header', message, 'The header is damaged: export the file again.', { column: n });
    }
    columns.push(column);
  }
  const facts = columns.map((column, i) => describe(hdu, column, i + 1, names[i]!, isAscii));
  return { columns, facts };
}

function binaryColumn({ header, number }: FitsHdu, n: number, offset: number): FitsColumn {
  const form = header.text(`TFORM${n}`) ?? '';
  const parts = /^(\d*)([LXBIJKAEDCMPQ])([LXBIJKAEDCM]?)/.exec(form);
  const isVariable = parts?.[2] === 'P' || parts?.[2] === 'Q';
  const repeat = parts?.[1] ? Number(parts[1]) : 1;
  if (parts === null || !Number.isSafeInteger(repeat) || (isVariable && (parts[3] === '' || repeat > 1))) {
    const message = `TFORM${n} of HDU ${number} is "${form}", which is no format of a binary table.`;
    throw new TableError('bad-header', message, 'The header is damaged: export the file again.', { column: n });
  }
  return { code: parts[2]!, repeat, offset, ...(isVariable ? { heapCode: parts[3]! } : {}), ...scaling(header, n) };
}

function asciiColumn({ header, number }: FitsHdu, n: number): FitsColumn {
  const form = header.text(`TFORM${n}`) ?? '';
  const parts = /^([AIFED])(\d+)/.exec(form);
  const begin = header.count(`TBCOL${n}`, number);
  if (parts === null || begin < 1) {
    const message = `TFORM${n} "${form}" or TBCOL${n} of HDU ${number} is not one of an ASCII table.`;
    throw new TableError('bad-header', message, 'The header is damaged: export the file again.', { column: n });
  }
  return { code: parts[1]!, repeat: Number(parts[2]), offset: begin - 1, ...scaling(header, n) };
}

function scaling(header: FitsHdu['header'], n: number) {
  const nullMark = header.text(`TNULL${n}`);
  const zero = header.text(`TZERO${n}`);
  return {
    scale: header.number(`TSCAL${n}`) ?? 1,
    zero: zero === undefined ? 0 : Number(zero) || 0,
    ...(nullMark === undefined ? {} : { nullMark }),
  };
}

function describe({ header }: FitsHdu, column: FitsColumn, n: number, name: string, isAscii: boolean): ColumnFacts {
  const { code, repeat, nullMark } = column;
  const facts: ColumnFacts = { name, type: columnType(column, isAscii) };
  const unit = header.text(`TUNIT${n}`);
  const ucd = header.text(`TUCD${n}`);
  const description = header.text(`TCOMM${n}`) ?? toldByComment(header.comments.get(`TTYPE${n}`));
  if (unit) facts.unit = unit;
  if (ucd) facts.ucd = ucd;
  if (description) facts.description = description;
  if (nullMark !== undefined && 'BIJK'.includes(code)) facts.nullMark = nullMark;
  if (nullMark !== undefined && isAscii) facts.nullMark = nullMark;
  const shape = header
    .text(`TDIM${n}`)
    ?.replace(/[()\s]/g, '')
    .replaceAll(',', 'x');
  if (column.heapCode !== undefined && column.heapCode !== 'A') facts.arraySize = '*';
  else if (!isAscii && repeat > 1 && code !== 'A') facts.arraySize = shape || String(repeat);
  else if (!isAscii && code === 'A' && shape?.includes('x')) facts.arraySize = shape;
  return facts;
}

/** Comments that only say that this is a column's name tell nothing. */
function toldByComment(comment: string | undefined): string | undefined {
  return comment !== undefined && /\b(label|heading|name|title)\b.*\b(field|column)\b/i.test(comment)
    ? undefined
    : comment;
}

function columnType(column: FitsColumn, isAscii: boolean): ColumnFacts['type'] {
  const { code, repeat, scale, zero } = column;
  if (isAscii)
    return code === 'A' ? 'text' : code === 'I' && scale === 1 && Number.isInteger(zero) ? 'integer' : 'number';
  if (repeat !== 1 || column.heapCode !== undefined) return 'text';
  if (code === 'L') return 'boolean';
  if ('BIJK'.includes(code)) return scale === 1 && Number.isInteger(zero) ? 'integer' : 'number';
  return code === 'E' || code === 'D' ? 'number' : 'text';
}
