import { ByteWindow } from '../bytes/byte-window.ts';
import type { Content } from '../bytes/content.ts';
import { cellText } from '../columns/cell-text.ts';
import { ChunkBuilder } from '../columns/chunk-builder.ts';
import { type RowFiller, streamChunks } from '../columns/stream-chunks.ts';
import { type ReaderLimits, type RowChunk, TableError } from '../table.ts';
import { jsonArrayText } from './json-array.ts';
import { isComment } from './comment-line.ts';
import { RecordScanner } from './record-scanner.ts';
import type { TextLayout } from './text-layout.ts';

const QUOTE = 34;

type RowsLayout = Pick<TextLayout, 'delimiter' | 'columns' | 'decimalComma' | 'dataStart' | 'dataLine' | 'skip'> & {
  /** Columns whose cells are arrays in JSON. */
  jsonArrays?: boolean[];
};

/** Streams the rows of a UTF-8 delimited text. */
export function delimitedRows(content: Content, layout: RowsLayout, limits: ReaderLimits): AsyncIterable<RowChunk> {
  const builder = new ChunkBuilder(layout.columns, limits, { decimalComma: layout.decimalComma, withLines: true });
  return streamChunks(builder, new DelimitedFiller(content, layout, limits));
}

class DelimitedFiller implements RowFiller {
  private readonly window: ByteWindow;
  private readonly scanner: RecordScanner;
  private line: number;

  constructor(
    content: Content,
    private readonly layout: RowsLayout,
    private readonly limits: ReaderLimits,
  ) {
    this.window = new ByteWindow(content, layout.dataStart, limits, true);
    this.scanner = new RecordScanner(layout.delimiter, limits.maxCellLength);
    this.line = layout.dataLine;
  }

  async fill(builder: ChunkBuilder): Promise<boolean> {
    const { window, scanner } = this;
    while (!builder.isFull) {
      const { buffer, start, end } = window;
      if (start < end) {
        const comment = isComment(buffer, start, end);
        const next = comment ? this.skipComment() : scanner.scan(buffer, start, end, window.ended);
        if (next >= 0) {
          if (!comment) this.takeRecord(builder, buffer, start, next);
          window.start = next;
          continue;
        }
      }
      if (end - start > this.limits.maxLineLength) throw this.tooLong();
      if (!(await window.more()) && window.start === window.end) return false;
    }
    return true;
  }

  close(): Promise<void> {
    return this.window.close();
  }

  private skipComment(): number {
    const { buffer, start, end, ended } = this.window;
    let stop = start;
    while (stop < end && buffer[stop] !== 10 && buffer[stop] !== 13) stop++;
    if (stop + 1 >= end && !ended) return -1;
    this.line++;
    return Math.min(end, buffer[stop] === 13 && buffer[stop + 1] === 10 ? stop + 2 : stop + 1);
  }

  private takeRecord(builder: ChunkBuilder, buffer: Buffer, start: number, next: number): void {
    const { starts, ends, doubled, count, newlines } = this.scanner;
    const line = this.line;
    const { skip, jsonArrays } = this.layout;
    const width = this.layout.columns.length + skip;
    this.line += newlines;
    if (count === 0 || (count === 1 && starts[0] === ends[0] && buffer[starts[0]! - 1] !== QUOTE)) return;
    if (next - start > this.limits.maxLineLength) throw this.tooLong(line);
    const trailing = count === width + 1 && starts[width] === ends[width];
    if (count !== width && !trailing) {
      return builder.breakRow(
        line,
        `The row has ${count - skip} cells, not ${width - skip}.`,
        rowText(buffer, start, next),
      );
    }
    for (let i = 0; i < width; i++) {
      if (ends[i]! - starts[i]! > this.limits.maxCellLength) {
        const reason = `Cell ${i + 1} is longer than the limit of ${this.limits.maxCellLength} bytes.`;
        return builder.breakRow(line, reason, rowText(buffer, start, next));
      }
    }
    const { columns, rows } = builder;
    for (let i = skip; i < width; i++) {
      const column = columns[i - skip]!;
      const isJson = jsonArrays?.[i] === true;
      if (doubled[i] === 0 && !isJson) column.putCell(rows, buffer, starts[i]!, ends[i]!);
      else {
        const text = cellText(buffer, starts[i]!, ends[i]!).replaceAll('""', '"');
        column.putText(rows, isJson ? jsonArrayText(text) : text);
      }
    }
    builder.endRow(line);
  }

  private tooLong(line = this.line): TableError {
    return new TableError(
      'line-too-long',
      `Line ${line} is longer than the limit of ${this.limits.maxLineLength} bytes.`,
      'Check for a missing line end or an unclosed quote there, or have the limit on line length raised.',
      { line, byte: this.window.position },
    );
  }
}

function rowText(buffer: Buffer, start: number, next: number): string {
  return cellText(buffer, start, Math.min(next, start + 4000)).replace(/[\r\n]+$/, '');
}
