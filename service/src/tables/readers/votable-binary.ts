import { Base64Window } from '../bytes/base64-window.ts';
import { ByteWindow } from '../bytes/byte-window.ts';
import type { Content } from '../bytes/content.ts';
import { cellText } from '../columns/cell-text.ts';
import type { ChunkBuilder } from '../columns/chunk-builder.ts';
import type { RowFiller } from '../columns/stream-chunks.ts';
import { type ReaderLimits, TableError } from '../table.ts';
import { floatText } from './float-text.ts';
import { checkRowCount } from './row-count.ts';
import type { VotableDatatype, VotableField, VotableTable } from './votable-head.ts';
import type { VotableData } from './votable-outline.ts';

type Column = ChunkBuilder['columns'][number];

const SIZES: Record<VotableDatatype, number> = {
  boolean: 1, bit: 1, unsignedByte: 1, short: 2, int: 4, long: 8, char: 1, unicodeChar: 2, float: 4, double: 8,
  floatComplex: 8, doubleComplex: 16,
}; // prettier-ignore

const CUT_OFF = -1;

/** Decodes the rows of a BINARY or BINARY2 stream: big-endian, without padding (VOTable 1.3 and later, section 5). */
export class BinaryFiller implements RowFiller {
  private readonly window: Base64Window;
  private readonly flagBytes: number;
  private done = false;

  constructor(
    content: Content,
    { serialisation, start, streamTag }: VotableData,
    private readonly table: VotableTable,
    private readonly limits: ReaderLimits,
  ) {
    if (/\shref\s*=/i.test(streamTag)) {
      throw new TableError(
        'external-stream',
        'The rows are kept elsewhere (STREAM href); links in uploaded files are never followed.',
        'Fetch the table with its rows inside, as TABLEDATA or with encoding="base64".',
        { byte: start },
      );
    }
    const encoding = /\sencoding\s*=\s*["']([^"']*)/.exec(streamTag)?.[1];
    if (streamTag !== '' && encoding !== 'base64') {
      const message = `The stream is encoded as "${encoding ?? 'nothing'}", not base64.`;
      throw new TableError('unsupported', message, 'Save the table with encoding="base64".', { byte: start });
    }
    this.done = streamTag === '' || streamTag.endsWith('/>');
    this.window = new Base64Window(new ByteWindow(content, start, limits));
    this.flagBytes = serialisation === 'BINARY2' ? Math.ceil(table.fields.length / 8) : 0;
  }

  async fill(builder: ChunkBuilder): Promise<boolean> {
    const { window } = this;
    while (!builder.isFull && !this.done) {
      const length = this.rowLength(builder.rowsMet + 1);
      if (length > 0) {
        this.takeRow(builder);
        window.start += length;
      } else if (!(await window.more())) {
        const left = window.end - window.start;
        if (left > 0) throw this.partialRow(builder.rowsMet + 1, left);
        checkRowCount(this.table.facts, builder.rowsMet, window.position);
        this.done = true;
      }
    }
    return !this.done;
  }

  close(): Promise<void> {
    return this.window.close();
  }

  /** Bytes of the row at the window's start, CUT_OFF when it is not all there. */
  private rowLength(row: number): number {
    const { buffer, start, end } = this.window;
    let at = start + this.flagBytes;
    for (const field of this.table.fields) {
      let count = field.length;
      if (count === null) {
        if (at + 4 > end) return CUT_OFF;
        count = buffer.readInt32BE(at);
        at += 4;
        if (count < 0 || count * SIZES[field.datatype] > this.limits.maxCellLength * 8)
          throw this.badLength(row, count);
      }
      at += field.datatype === 'bit' ? Math.ceil(count / 8) : count * SIZES[field.datatype];
    }
    if (at - start > this.limits.maxLineLength * 8) throw this.badLength(row, at - start);
    return at > end || at === start ? CUT_OFF : at - start;
  }

  private takeRow(builder: ChunkBuilder): void {
    const { buffer, start } = this.window;
    const { fields } = this.table;
    let at = start + this.flagBytes;
    for (let i = 0; i < fields.length; i++) {
      const field = fields[i]!;
      const column = builder.columns[i]!;
      let count = field.length;
      if (count === null) {
        count = buffer.readInt32BE(at);
        at += 4;
      }
      const size = field.datatype === 'bit' ? Math.ceil(count / 8) : count * SIZES[field.datatype];
      const isNull = this.flagBytes > 0 && (buffer[start + (i >> 3)]! & (0x80 >> (i & 7))) !== 0;
      if (isNull) column.putMissing(builder.rows);
      else if (field.isArray || count !== 1) putArray(column, builder.rows, field, buffer, at, count);
      else putScalar(column, builder.rows, field, buffer, at);
      at += size;
    }
    builder.endRow();
  }

  private partialRow(row: number, left: number): TableError {
    const message = `Row ${row} is incomplete: ${left} bytes are left over after the last whole row.`;
    return new TableError('truncated', message, 'Fetch the table again.', { byte: this.window.position });
  }

  private badLength(row: number, length: number): TableError {
    const message = `Row ${row} claims a cell or row of ${length} elements or bytes, more than the limits allow.`;
    return new TableError('bad-data', message, 'The data are damaged: export or fetch the table again.', {
      byte: this.window.position,
    });
  }
}

function putScalar(column: Column, row: number, field: VotableField, bytes: Buffer, at: number): void {
  switch (field.datatype) {
    case 'unsignedByte':
      return column.putNumber(row, bytes[at]!);
    case 'short':
      return column.putNumber(row, bytes.readInt16BE(at));
    case 'int':
      return column.putNumber(row, bytes.readInt32BE(at));
    case 'long':
      return column.putBigInt(row, bytes.readBigInt64BE(at));
    case 'float':
      return column.putNumber(row, bytes.readFloatBE(at));
    case 'double':
      return column.putNumber(row, bytes.readDoubleBE(at));
    default:
      return putArray(column, row, field, bytes, at, 1);
  }
}

function putArray(column: Column, row: number, field: VotableField, bytes: Buffer, at: number, count: number): void {
  if (field.datatype === 'char') {
    const nul = bytes.subarray(at, at + count).indexOf(0);
    const length = nul < 0 ? count : nul;
    return column.putText(row, cellText(bytes, at, at + length).trimEnd());
  }
  if (field.datatype === 'unicodeChar') {
    const text = Buffer.from(bytes.subarray(at, at + 2 * count))
      .swap16()
      .toString('utf16le');
    return column.putText(row, text.replace(/\0[\s\S]*$/, '').trimEnd());
  }
  const items: string[] = [];
  for (let i = 0; i < count; i++) {
    const item = itemText(field.datatype, bytes, at, i);
    items.push(item === field.nullMark ? 'NaN' : item);
  }
  column.putText(row, items.join(' '));
}

function itemText(datatype: VotableDatatype, bytes: Buffer, at: number, i: number): string {
  switch (datatype) {
    case 'boolean':
      return booleanText(bytes[at + i]!);
    case 'bit':
      return (bytes[at + (i >> 3)]! & (0x80 >> (i & 7))) === 0 ? '0' : '1';
    case 'unsignedByte':
      return String(bytes[at + i]!);
    case 'short':
      return String(bytes.readInt16BE(at + 2 * i));
    case 'int':
      return String(bytes.readInt32BE(at + 4 * i));
    case 'long':
      return String(bytes.readBigInt64BE(at + 8 * i));
    case 'float':
      return floatText(bytes.readFloatBE(at + 4 * i));
    case 'floatComplex':
      return `${floatText(bytes.readFloatBE(at + 8 * i))} ${floatText(bytes.readFloatBE(at + 8 * i + 4))}`;
    case 'doubleComplex':
      return `${bytes.readDoubleBE(at + 16 * i)} ${bytes.readDoubleBE(at + 16 * i + 8)}`;
    default:
      return String(bytes.readDoubleBE(at + 8 * i));
  }
}

function booleanText(byte: number): string {
  const letter = String.fromCharCode(byte);
  if (/[Tt1]/.test(letter) || byte === 1) return 'true';
  return /[Ff0]/.test(letter) ? 'false' : '';
}
