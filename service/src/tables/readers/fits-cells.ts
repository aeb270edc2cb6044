import { cellText } from '../columns/cell-text.ts';
import type { FitsColumn } from './fits-columns.ts';
import { floatText } from './float-text.ts';

type Scaling = Pick<FitsColumn, 'scale' | 'zero' | 'nullMark'>;

/** The text of a cell with any number of elements: strings as they are, other elements with blanks between. */
export function arrayText(code: string, bytes: Buffer, at: number, count: number, scaling: Scaling): string {
  if (code === 'A') {
    const nul = bytes.subarray(at, at + count).indexOf(0);
    return cellText(bytes, at, at + (nul < 0 ? count : nul)).trimEnd();
  }
  const items: string[] = [];
  for (let i = 0; i < count; i++) items.push(itemText(code, bytes, at, i, scaling));
  return items.join(' ').trim();
}

/** T is true, F is false, a zero byte is null (FITS 4.0, section 7.3.3.1). */
export function logicalText(byte: number): string {
  return byte === 0x54 ? 'true' : byte === 0x46 ? 'false' : '';
}

/** A 64-bit whole number with its offset added, without loss. */
export function longValue(bytes: Buffer, at: number, zero: number): bigint {
  const stored = bytes.readBigInt64BE(at);
  return zero === 0 ? stored : stored + BigInt(zero);
}

function itemText(code: string, bytes: Buffer, at: number, i: number, scaling: Scaling): string {
  switch (code) {
    case 'L':
      return logicalText(bytes[at + i]!);
    case 'X':
      return (bytes[at + (i >> 3)]! & (0x80 >> (i & 7))) === 0 ? '0' : '1';
    case 'B':
      return scaled(bytes[at + i]!, scaling);
    case 'I':
      return scaled(bytes.readInt16BE(at + 2 * i), scaling);
    case 'J':
      return scaled(bytes.readInt32BE(at + 4 * i), scaling);
    case 'K': {
      const exact = scaling.scale === 1 && Number.isInteger(scaling.zero);
      const stored = bytes.readBigInt64BE(at + 8 * i);
      if (String(stored) === scaling.nullMark) return 'NaN';
      return exact ? String(stored + BigInt(scaling.zero)) : scaled(Number(stored), scaling);
    }
    case 'E': {
      const value = bytes.readFloatBE(at + 4 * i);
      return scaling.scale === 1 && scaling.zero === 0 ? floatText(value) : scaled(value, scaling);
    }
    case 'D':
      return scaled(bytes.readDoubleBE(at + 8 * i), scaling);
    case 'C':
      return `${floatText(bytes.readFloatBE(at + 8 * i))} ${floatText(bytes.readFloatBE(at + 8 * i + 4))}`;
    default:
      return `${bytes.readDoubleBE(at + 16 * i)} ${bytes.readDoubleBE(at + 16 * i + 8)}`;
  }
}

function scaled(stored: number, { scale, zero, nullMark }: Scaling): string {
  return String(stored) === nullMark ? 'NaN' : String(stored * scale + zero);
}
