import type { BrokenRow, ColumnFacts, ReaderLimits, RowChunk } from '../table.ts';
import { NumberColumn, type NumberColumnOptions } from './number-column.ts';
import { TextColumn } from './text-column.ts';

/** Numbers of a whole chunk held at once: 16 MiB. */
const MAX_CELLS = 2 ** 21;
const MAX_TEXT_BYTES = 32 * 1024 ** 2;
const MAX_BROKEN = 1_000;

/** Collects rows into chunks of typed columns. */
export class ChunkBuilder {
  readonly columns: (NumberColumn | TextColumn)[];
  /** Rows in the chunk being filled. */
  rows = 0;
  /** Rows met in all, broken ones counted. */
  rowsMet = 0;
  private readonly capacity: number;
  private firstRow = 1;
  private lines: Uint32Array;
  private rowNumbers: Uint32Array;
  private broken: BrokenRow[] = [];

  constructor(
    facts: ColumnFacts[],
    limits: ReaderLimits,
    private readonly options: NumberColumnOptions & { withLines?: boolean } = {},
  ) {
    this.capacity = Math.max(1, Math.min(limits.chunkRows, Math.floor(MAX_CELLS / Math.max(1, facts.length))));
    this.columns = facts.map((column) => {
      const mark = column.nullMark === undefined ? {} : { nullMark: column.nullMark };
      return column.type === 'text' || column.type === 'boolean'
        ? new TextColumn(this.capacity, column.nullMark)
        : new NumberColumn(this.capacity, {
            ...options,
            ...mark,
            isFloat: Boolean(options.lenient) && column.type === 'number',
          });
    });
    this.lines = new Uint32Array(options.withLines ? this.capacity : 0);
    this.rowNumbers = new Uint32Array(this.capacity);
  }

  get isEmpty(): boolean {
    return this.rows === 0 && this.broken.length === 0;
  }

  /** Rows that still fit. */
  get room(): number {
    return this.capacity - this.rows;
  }

  get isFull(): boolean {
    if (this.rows >= this.capacity || this.broken.length >= MAX_BROKEN) return true;
    if ((this.rows & 255) !== 0) return false;
    let bytes = 0;
    for (const column of this.columns) bytes += column.textBytes;
    return bytes > MAX_TEXT_BYTES;
  }

  /** Ends a row whose every column has been put at index `rows`. */
  endRow(line = 0): void {
    if (this.options.withLines) this.lines[this.rows] = line;
    this.rowNumbers[this.rows++] = ++this.rowsMet;
  }

  breakRow(line: number, reason: string, text: string): void {
    this.broken.push({ row: ++this.rowsMet, line, reason, text: text.slice(0, 1000) });
  }

  take(): RowChunk {
    const { rows, broken, firstRow } = this;
    const chunk: RowChunk = { firstRow, rows, columns: this.columns.map((column) => column.take(rows)) };
    if (this.options.withLines) chunk.lines = this.lines.slice(0, rows);
    if (broken.length > 0) {
      chunk.broken = broken;
      chunk.rowNumbers = this.rowNumbers.slice(0, rows);
    }
    this.rows = 0;
    this.broken = [];
    this.firstRow = this.rowsMet + 1;
    return chunk;
  }
}
