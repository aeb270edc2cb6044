import { ByteWindow } from '../bytes/byte-window.ts';
import type { Content } from '../bytes/content.ts';
import type { ChunkBuilder } from '../columns/chunk-builder.ts';
import { NumberColumn } from '../columns/number-column.ts';
import type { RowFiller } from '../columns/stream-chunks.ts';
import { type ReaderLimits, TableError } from '../table.ts';
import type { FitsColumn } from './fits-columns.ts';
import type { FitsHdu } from './fits-hdus.ts';

/** Reads the rows of a FITS ASCII table (FITS 4.0, section 7.2): fields at fixed places; blank fields are missing. */
export class AsciiTableFiller implements RowFiller {
  private readonly window: ByteWindow;
  private readonly rowBytes: number;
  private readonly rowsInAll: number;

  constructor(
    content: Content,
    private readonly hdu: FitsHdu,
    private readonly columns: FitsColumn[],
    limits: ReaderLimits,
  ) {
    this.rowBytes = hdu.header.count('NAXIS1', hdu.number);
    this.rowsInAll = this.rowBytes === 0 ? 0 : hdu.header.count('NAXIS2', hdu.number);
    this.window = new ByteWindow(content, hdu.dataStart, limits);
  }

  async fill(builder: ChunkBuilder): Promise<boolean> {
    const { window, rowBytes } = this;
    while (!builder.isFull && builder.rowsMet < this.rowsInAll) {
      if (!(await window.need(rowBytes))) throw this.truncated(builder.rowsMet);
      for (const [i, column] of this.columns.entries()) this.putField(builder.columns[i]!, column, builder.rows);
      builder.endRow();
      window.start += rowBytes;
    }
    return builder.rowsMet < this.rowsInAll;
  }

  close(): Promise<void> {
    return this.window.close();
  }

  private putField(target: ChunkBuilder['columns'][number], column: FitsColumn, row: number): void {
    const { buffer, start } = this.window;
    const { code, scale, zero, nullMark } = column;
    let from = start + column.offset;
    let to = from + column.repeat;
    if (code !== 'A') while (from < to && buffer[from] === 32) from++;
    while (to > from && (buffer[to - 1] === 32 || buffer[to - 1] === 0)) to--;
    if (nullMark !== undefined && buffer.toString('latin1', from, to).trim() === nullMark) target.putMissing(row);
    else if (!(target instanceof NumberColumn) || (scale === 1 && zero === 0)) target.putCell(row, buffer, from, to);
    else {
      const value = Number(buffer.toString('latin1', from, to).replace(/[dD]/, 'e'));
      if (from === to || !Number.isFinite(value)) target.putCell(row, buffer, from, to);
      else target.putNumber(row, value * scale + zero);
    }
  }

  private truncated(rows: number): TableError {
    const byte = this.window.at(this.window.end);
    const message = `HDU ${this.hdu.number} promises ${this.rowsInAll} rows, but the file ends in row ${rows + 1} (byte ${byte}).`;
    return new TableError('truncated', message, 'Fetch the file again.', { byte });
  }
}
