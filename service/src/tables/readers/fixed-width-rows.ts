import { ByteWindow } from '../bytes/byte-window.ts';
import type { Content } from '../bytes/content.ts';
import { cellText } from '../columns/cell-text.ts';
import { ChunkBuilder } from '../columns/chunk-builder.ts';
import { type RowFiller, streamChunks } from '../columns/stream-chunks.ts';
import { type ColumnFacts, type ReaderLimits, type RowChunk, TableError } from '../table.ts';

const LINE_FEED = 10;
const BLANK = 32;

/** Where the rows of a table with fixed column places stand. */
export interface FixedWidthLayout {
  /** Bytes of each column within a line, from `starts[i]` up to but without `ends[i]`, counted from 0. */
  starts: number[];
  ends: number[];
  dataStart: number;
  dataLine: number;
  /** What stands beyond the last column makes a row broken, unless it may be ignored. */
  ignoreBeyond?: boolean;
}

/** Streams the rows of a text table whose columns are told by their places in the line. */
export function fixedWidthRows(
  content: Content,
  columns: ColumnFacts[],
  layout: FixedWidthLayout,
  limits: ReaderLimits,
): AsyncIterable<RowChunk> {
  const builder = new ChunkBuilder(columns, limits, { withLines: true, lenient: true });
  return streamChunks(builder, new FixedWidthFiller(content, layout, limits));
}

class FixedWidthFiller implements RowFiller {
  private readonly window: ByteWindow;
  private readonly width: number;
  private line: number;

  constructor(
    content: Content,
    private readonly layout: FixedWidthLayout,
    private readonly limits: ReaderLimits,
  ) {
    this.window = new ByteWindow(content, layout.dataStart, limits, true);
    this.width = Math.max(0, ...layout.ends);
    this.line = layout.dataLine;
  }

  async fill(builder: ChunkBuilder): Promise<boolean> {
    const { window } = this;
    while (!builder.isFull) {
      const { buffer, start, end } = window;
      const found = start < end ? buffer.indexOf(LINE_FEED, start) : -1;
      const stop = found < 0 && window.ended ? end : found;
      if ((stop < 0 ? end : stop) - start > this.limits.maxLineLength) throw this.tooLong();
      if (start < end && stop >= 0) {
        this.takeLine(builder, buffer, start, buffer[stop - 1] === 13 && stop > start ? stop - 1 : stop);
        window.start = Math.min(end, stop + 1);
        this.line++;
      } else if (!(await window.more()) && window.start === window.end) return false;
    }
    return true;
  }

  close(): Promise<void> {
    return this.window.close();
  }

  private takeLine(builder: ChunkBuilder, buffer: Buffer, start: number, lineEnd: number): void {
    let end = lineEnd;
    while (end > start && buffer[end - 1]! <= BLANK) end--;
    if (end === start) return;
    if (end - start > this.width && !this.layout.ignoreBeyond) {
      const reason = `The line has ${end - start} characters, more than the ${this.width} that are described.`;
      return builder.breakRow(this.line, reason, cellText(buffer, start, Math.min(end, start + 4000)));
    }
    const { starts, ends } = this.layout;
    for (let i = 0; i < starts.length; i++) {
      let from = Math.min(end, start + starts[i]!);
      let to = Math.min(end, start + ends[i]!);
      while (from < to && buffer[from] === BLANK) from++;
      while (to > from && buffer[to - 1] === BLANK) to--;
      builder.columns[i]!.putCell(builder.rows, buffer, from, to);
    }
    builder.endRow(this.line);
  }

  private tooLong(): TableError {
    const message = `Line ${this.line} is longer than the limit of ${this.limits.maxLineLength} bytes.`;
    return new TableError('line-too-long', message, 'Check for missing line ends there.', {
      line: this.line,
      byte: this.window.position,
    });
  }
}
