import { isUtf8 } from 'node:buffer';
import type { ColumnData } from '../table.ts';
import { cellText } from './cell-text.ts';

/** Collects one column of text as UTF-8. Rows must come in order. */
export class TextColumn {
  private bytes = Buffer.allocUnsafe(4096);
  private offsets: Uint32Array;
  private length = 0;

  constructor(
    capacity: number,
    /** Text declared as null by the file. */
    private readonly nullMark?: string,
  ) {
    this.offsets = new Uint32Array(capacity + 1);
  }

  get textBytes(): number {
    return this.length;
  }

  putCell(row: number, bytes: Buffer, start: number, end: number): void {
    const size = end - start;
    if (this.nullMark !== undefined && size > 0 && cellText(bytes, start, end) === this.nullMark) {
      this.offsets[row + 1] = this.length;
      return;
    }
    if (this.length + size > this.bytes.length) this.grow(size);
    const target = this.bytes;
    let to = this.length;
    if (size < 32) for (let i = start; i < end; i++) target[to++] = bytes[i]!;
    else target.set(bytes.subarray(start, end), to);
    this.length += size;
    this.offsets[row + 1] = this.length;
  }

  putText(row: number, text: string): void {
    const bytes = Buffer.from(text);
    this.putCell(row, bytes, 0, bytes.length);
  }

  putNumber(row: number, value: number): void {
    if (Number.isNaN(value)) this.putMissing(row);
    else this.putText(row, String(value));
  }

  putBigInt(row: number, value: bigint): void {
    this.putText(row, String(value));
  }

  putMissing(row: number): void {
    this.offsets[row + 1] = this.length;
  }

  /** Hands over the first `rows` cells and starts afresh. */
  take(rows: number): ColumnData {
    const offsets = this.offsets.slice(0, rows + 1);
    const bytes = Uint8Array.prototype.slice.call(this.bytes, 0, this.length);
    this.length = 0;
    return isUtf8(bytes) ? { kind: 'text', offsets, bytes } : recoded(offsets, bytes, rows);
  }

  private grow(size: number): void {
    const larger = Buffer.allocUnsafe(Math.max(this.bytes.length * 2, this.length + size));
    this.bytes.copy(larger, 0, 0, this.length);
    this.bytes = larger;
  }
}

/** Mixed encodings: the cells that are not UTF-8 are read as Windows-1252, the others stay. */
function recoded(offsets: Uint32Array, bytes: Uint8Array, rows: number): ColumnData {
  const cells: Buffer[] = [];
  const places = new Uint32Array(rows + 1);
  for (let row = 0; row < rows; row++) {
    const cell = Buffer.from(cellText(bytes, offsets[row]!, offsets[row + 1]!));
    cells.push(cell);
    places[row + 1] = places[row]! + cell.length;
  }
  return { kind: 'text', offsets: places, bytes: new Uint8Array(Buffer.concat(cells)) };
}
