import { ByteWindow } from '../bytes/byte-window.ts';
import type { Content } from '../bytes/content.ts';
import type { ChunkBuilder } from '../columns/chunk-builder.ts';
import type { RowFiller } from '../columns/stream-chunks.ts';
import { type ReaderLimits, TableError } from '../table.ts';
import { decodeXml } from './decode-xml.ts';
import { checkRowCount } from './row-count.ts';
import { putTableCell } from './votable-cells.ts';
import type { VotableTable } from './votable-head.ts';

const LESS = 0x3c;
const GREATER = 0x3e;
const SLASH = 0x2f;
const CUT_OFF = -1;
const END = -2;

/** Scans the rows of a TABLEDATA element, without building a document. */
export class TableDataFiller implements RowFiller {
  private readonly window: ByteWindow;
  private starts: Int32Array;
  private ends: Int32Array;
  /** Cells with entities, comments or CDATA, decoded. */
  private decoded: (Buffer | undefined)[];
  private hasDecoded = false;
  private count = 0;
  private done = false;

  constructor(
    content: Content,
    start: number,
    private readonly table: VotableTable,
    private readonly limits: ReaderLimits,
  ) {
    this.window = new ByteWindow(content, start, limits);
    const width = table.fields.length + 1;
    this.starts = new Int32Array(width);
    this.ends = new Int32Array(width);
    this.decoded = new Array<Buffer | undefined>(width);
  }

  async fill(builder: ChunkBuilder): Promise<boolean> {
    const { window } = this;
    while (!builder.isFull) {
      if (this.done) return false;
      const next = this.scanRow(window.buffer, window.start, window.end);
      if (next >= 0) {
        this.takeRow(builder, next);
        window.start = next;
      } else if (next === END) {
        checkRowCount(this.table.facts, builder.rowsMet, window.position);
        this.done = true;
        return false;
      } else {
        if (window.end - window.start > this.limits.maxLineLength) throw this.tooLong(builder.rowsMet + 1);
        if (!(await window.more())) throw this.truncated();
      }
    }
    return true;
  }

  close(): Promise<void> {
    return this.window.close();
  }

  /** Finds the cells of the next TR; answers the index after it, CUT_OFF or END. */
  private scanRow(bytes: Buffer, from: number, end: number): number {
    this.count = 0;
    this.hasDecoded = false;
    let inRow = false;
    let i = from;
    for (;;) {
      const less = bytes.indexOf(LESS, i);
      if (less < 0 || less + 3 >= end) return CUT_OFF;
      const after = bytes[less + 1]!;
      if (after === 0x21 || after === 0x3f) {
        const stop = this.skipMarkup(bytes, less, end);
        if (stop < 0) return CUT_OFF;
        i = stop;
        continue;
      }
      const greater = bytes.indexOf(GREATER, less);
      if (greater < 0 || greater >= end) return CUT_OFF;
      const name = localName(bytes, less + (after === SLASH ? 2 : 1), greater);
      i = greater + 1;
      if (after === SLASH) {
        if (name === 'TR') return inRow ? i : this.malformed(less, '</TR> without <TR>');
        if (name === 'TABLEDATA') return inRow ? this.malformed(less, 'a row is not closed') : END;
        this.malformed(less, `</${name}> where a row or cell should begin`);
      } else if (name === 'TR') {
        if (inRow) this.malformed(less, 'a row begins inside a row');
        inRow = true;
        if (bytes[greater - 1] === SLASH) return i;
      } else if (name === 'TD' && inRow) {
        i = this.scanCell(bytes, greater, end);
        if (i < 0) return CUT_OFF;
      } else this.malformed(less, `<${name}> where a row or cell should begin`);
    }
  }

  /** Takes the cell whose start tag ends at `greater`; answers the index after its end tag. */
  private scanCell(bytes: Buffer, greater: number, end: number): number {
    const cell = this.count++;
    const keep = cell < this.starts.length;
    if (bytes[greater - 1] === SLASH) {
      if (keep) this.starts[cell] = this.ends[cell] = greater;
      return greater + 1;
    }
    let i = greater + 1;
    let special = false;
    for (; i < end; i++) {
      const byte = bytes[i]!;
      if (byte === 0x26) special = true;
      else if (byte === LESS) {
        if (i + 1 >= end) return CUT_OFF;
        if (bytes[i + 1] === SLASH) break;
        const stop = this.skipMarkup(bytes, i, end);
        if (stop < 0) return CUT_OFF;
        special = true;
        i = stop - 1;
      }
    }
    const close = bytes.indexOf(GREATER, i);
    if (i >= end || close < 0 || close >= end) return CUT_OFF;
    const name = localName(bytes, i + 2, close);
    if (name !== 'TD') this.malformed(i, `</${name}> inside a cell`);
    if (keep) {
      this.starts[cell] = greater + 1;
      this.ends[cell] = i;
      if (special) {
        this.decoded[cell] = Buffer.from(plainText(bytes.toString('utf8', greater + 1, i)));
        this.hasDecoded = true;
      }
    }
    return close + 1;
  }

  /** Index after a comment, CDATA section or processing instruction, CUT_OFF when its end is not there yet. */
  private skipMarkup(bytes: Buffer, at: number, end: number): number {
    if (at + 9 >= end) return CUT_OFF;
    const opening = bytes.toString('latin1', at, at + 9);
    const closing = opening.startsWith('<!--')
      ? '-->'
      : opening === '<![CDATA['
        ? ']]>'
        : opening.startsWith('<?')
          ? '?>'
          : '';
    if (closing === '') return this.malformed(at, 'a tag inside a cell');
    const stop = bytes.indexOf(closing, at + 4);
    return stop < 0 || stop + closing.length > end ? CUT_OFF : stop + closing.length;
  }

  private takeRow(builder: ChunkBuilder, next: number): void {
    const { buffer, start } = this.window;
    const { fields } = this.table;
    if (this.count !== fields.length) {
      const reason = `The row has ${this.count} cells, not ${fields.length}.`;
      builder.breakRow(0, reason, buffer.toString('utf8', start, next).trim());
    } else {
      for (let i = 0; i < fields.length; i++) {
        const decoded = this.hasDecoded ? this.decoded[i] : undefined;
        if (decoded !== undefined)
          putTableCell(builder.columns[i]!, fields[i]!, builder.rows, decoded, 0, decoded.length);
        else putTableCell(builder.columns[i]!, fields[i]!, builder.rows, buffer, this.starts[i]!, this.ends[i]!);
      }
      builder.endRow();
    }
    if (this.hasDecoded) this.decoded.fill(undefined);
  }

  private malformed(at: number, what: string): never {
    const byte = this.window.at(at);
    throw new TableError('bad-data', `The rows are not well-formed: ${what} (byte ${byte}).`, 'Export it again.', {
      byte,
    });
  }

  private tooLong(row: number): TableError {
    const message = `Row ${row} is longer than the limit of ${this.limits.maxLineLength} bytes.`;
    return new TableError('line-too-long', message, 'Leave out its largest column.', { byte: this.window.position });
  }

  private truncated(): TableError {
    const byte = this.window.at(this.window.end);
    return new TableError('truncated', `The file breaks off inside the rows (byte ${byte}).`, 'Fetch it again.', {
      byte,
    });
  }
}

function localName(bytes: Buffer, from: number, to: number): string {
  // The names met in every row, without making a string of the tag.
  if (to - from === 2 && bytes[from] === 0x54) {
    if (bytes[from + 1] === 0x44) return 'TD';
    if (bytes[from + 1] === 0x52) return 'TR';
  }
  const name = /^[^\s/>]+/.exec(bytes.toString('latin1', from, Math.min(to, from + 100)))?.[0] ?? '';
  return name.replace(/^.*:/, '');
}

function plainText(xml: string): string {
  return xml
    .split(/(<!\[CDATA\[[\s\S]*?\]\]>|<!--[\s\S]*?-->|<\?[\s\S]*?\?>)/)
    .map((part) => (part.startsWith('<![CDATA[') ? part.slice(9, -3) : part.startsWith('<') ? '' : decodeXml(part)))
    .join('');
}
