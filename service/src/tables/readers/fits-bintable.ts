import { ByteWindow } from '../bytes/byte-window.ts';
import type { Content } from '../bytes/content.ts';
import type { ChunkBuilder } from '../columns/chunk-builder.ts';
import { NumberColumn } from '../columns/number-column.ts';
import type { RowFiller } from '../columns/stream-chunks.ts';
import { type ReaderLimits, TableError, type TableFacts } from '../table.ts';
import { arrayText, logicalText, longValue } from './fits-cells.ts';
import { type FitsColumn, elementBytes } from './fits-columns.ts';
import { FitsHeap } from './fits-heap.ts';
import type { FitsHdu } from './fits-hdus.ts';

type Column = ChunkBuilder['columns'][number];

/** Decodes the rows of a FITS binary table (FITS 4.0, section 7.3), column by column over the rows at hand. */
export class BinTableFiller implements RowFiller {
  private readonly window: ByteWindow;
  private readonly heaps = new Map<FitsColumn, FitsHeap>();
  private readonly rowBytes: number;
  private readonly rowsInAll: number;
  private readonly heapBytes: number;
  private rowsRead = 0;

  constructor(
    content: Content,
    private readonly hdu: FitsHdu,
    private readonly columns: FitsColumn[],
    private readonly facts: TableFacts,
    private readonly limits: ReaderLimits,
  ) {
    const { header, number, dataStart } = hdu;
    this.rowBytes = header.count('NAXIS1', number);
    this.rowsInAll = this.rowBytes === 0 ? 0 : header.count('NAXIS2', number);
    const tableBytes = this.rowBytes * this.rowsInAll;
    const heapStart = header.count('THEAP', number, tableBytes);
    this.heapBytes = Math.max(0, tableBytes + header.count('PCOUNT', number, 0) - heapStart);
    this.window = new ByteWindow(content, dataStart, limits);
    for (const column of columns) {
      if (column.heapCode !== undefined) this.heaps.set(column, new FitsHeap(content, dataStart + heapStart, limits));
    }
  }

  async fill(builder: ChunkBuilder): Promise<boolean> {
    const { window, rowBytes } = this;
    while (!builder.isFull && this.rowsRead < this.rowsInAll) {
      if (!(await window.need(rowBytes))) throw this.truncated(builder.rowsMet);
      const atHand = Math.floor((window.end - window.start) / rowBytes);
      await this.takeRows(builder, Math.min(atHand, builder.room, this.rowsInAll - this.rowsRead));
    }
    return this.rowsRead < this.rowsInAll;
  }

  async close(): Promise<void> {
    await this.window.close();
    for (const heap of this.heaps.values()) await heap.close();
  }

  private async takeRows(builder: ChunkBuilder, atHand: number): Promise<void> {
    let count = atHand;
    let fault: TableError | undefined;
    for (const [i, column] of this.columns.entries()) {
      if (column.heapCode === undefined) continue;
      for (let row = 0; row < count && count > 0; row++) {
        fault = (await this.takeHeapCell(builder, i, row)) ?? fault;
        // The rows before a bad cell are kept.
        if (fault !== undefined) count = Math.min(count, row);
      }
    }
    for (const [i, column] of this.columns.entries()) {
      if (column.heapCode === undefined) this.takeColumn(builder.columns[i]!, column, builder.rows, count);
    }
    for (let row = 0; row < count; row++) builder.endRow();
    this.rowsRead += count;
    this.window.start += count * this.rowBytes;
    if (fault !== undefined) throw fault;
  }

  private async takeHeapCell(builder: ChunkBuilder, index: number, row: number): Promise<TableError | undefined> {
    const column = this.columns[index]!;
    const { buffer, start } = this.window;
    const at = start + row * this.rowBytes + column.offset;
    const target = builder.columns[index]!;
    if (column.repeat === 0) return void target.putMissing(builder.rows + row);
    const isLong = column.code === 'Q';
    const count = isLong ? Number(buffer.readBigInt64BE(at)) : buffer.readInt32BE(at);
    const offset = isLong ? Number(buffer.readBigInt64BE(at + 8)) : buffer.readInt32BE(at + 4);
    if (count === 0) return void target.putMissing(builder.rows + row);
    const bytes = elementBytes(column.heapCode!, count);
    const place = { column: this.facts.columns[index]!.name, byte: this.window.at(at) };
    const name = `Row ${builder.rowsMet + row + 1} of column ${place.column}`;
    if (count < 0 || offset < 0 || offset + bytes > this.heapBytes) {
      return new TableError(
        'bad-data',
        `${name} points outside the heap.`,
        'The file is damaged: export it again.',
        place,
      );
    }
    if (bytes > this.limits.maxCellLength) {
      const message = `${name} holds ${bytes} bytes, more than the limit of ${this.limits.maxCellLength}.`;
      return new TableError(
        'cell-too-long',
        message,
        'Leave that column out, or have the limit on cells raised.',
        place,
      );
    }
    const heap = this.heaps.get(column)!;
    const found = await heap.locate(offset, bytes);
    if (found < 0)
      return new TableError('truncated', `The file ends before the cell of ${name}.`, 'Fetch it again.', place);
    target.putText(builder.rows + row, arrayText(column.heapCode!, heap.buffer, found, count, column));
    return undefined;
  }

  private takeColumn(target: Column, column: FitsColumn, firstRow: number, count: number): void {
    const { buffer, start } = this.window;
    const { rowBytes } = this;
    let at = start + column.offset;
    const read = column.repeat === 1 && target instanceof NumberColumn ? numberReader(column, buffer) : undefined;
    for (let row = firstRow; row < firstRow + count; row++, at += rowBytes) {
      if (read !== undefined) target.putNumber(row, read(at));
      else if (column.repeat === 0) target.putMissing(row);
      else putOther(target, column, buffer, at, row);
    }
  }

  private truncated(rows: number): TableError {
    const byte = this.window.at(this.window.end);
    const message = `HDU ${this.hdu.number} promises ${this.rowsInAll} rows, but the file ends in row ${rows + 1} (byte ${byte}).`;
    return new TableError('truncated', message, 'Fetch the file again.', { byte });
  }
}

/** Reads one scalar as its physical value; undefined for 64-bit whole numbers without scale, which need care. */
function numberReader(
  { code, scale, zero, nullMark }: FitsColumn,
  buffer: Buffer,
): ((at: number) => number) | undefined {
  const view = new DataView(buffer.buffer, buffer.byteOffset, buffer.length);
  if (code === 'K' && scale === 1 && Number.isInteger(zero)) return undefined;
  const blank = nullMark === undefined || !'BIJK'.includes(code) ? NaN : Number(nullMark);
  const stored = {
    B: (at: number) => view.getUint8(at),
    I: (at: number) => view.getInt16(at),
    J: (at: number) => view.getInt32(at),
    K: (at: number) => Number(view.getBigInt64(at)),
    E: (at: number) => view.getFloat32(at),
    D: (at: number) => view.getFloat64(at),
  }[code]!;
  if (scale === 1 && zero === 0 && Number.isNaN(blank)) return stored;
  return (at) => {
    const value = stored(at);
    return value === blank ? NaN : value * scale + zero;
  };
}

function putOther(target: Column, column: FitsColumn, buffer: Buffer, at: number, row: number): void {
  const { code, repeat, zero } = column;
  if (code === 'K' && repeat === 1 && column.scale === 1 && Number.isInteger(zero)) {
    if (column.nullMark !== undefined && String(buffer.readBigInt64BE(at)) === column.nullMark) target.putMissing(row);
    else target.putBigInt(row, longValue(buffer, at, zero));
  } else if (code === 'A') {
    let end = at;
    const limit = at + repeat;
    while (end < limit && buffer[end] !== 0) end++;
    while (end > at && buffer[end - 1] === 32) end--;
    target.putCell(row, buffer, at, end);
  } else if (code === 'L' && repeat === 1) target.putText(row, logicalText(buffer[at]!));
  else target.putText(row, arrayText(code, buffer, at, repeat, column));
}
