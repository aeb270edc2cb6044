import type { BulkColumn, BulkType, CopyPiece } from './bulk.ts';
import { JsonText } from './json-text.ts';

// Source: PostgreSQL documentation, COPY, binary format: signature, flags, length of the header extension.
const HEADER = Uint8Array.of(0x50, 0x47, 0x43, 0x4f, 0x50, 0x59, 0x0a, 0xff, 0x0d, 0x0a, 0, 0, 0, 0, 0, 0, 0, 0, 0);
const NUL = String.fromCharCode(0);

/** Rows as PostgreSQL's binary COPY format, in a buffer that grows. */
export class CopyEncoder {
  #bytes: Uint8Array<ArrayBuffer>;
  #view: DataView;
  #length = 0;
  rows = 0;

  constructor(
    private readonly columns: readonly BulkColumn[],
    capacity = 1 << 20,
  ) {
    this.#bytes = new Uint8Array(capacity);
    this.#view = new DataView(this.#bytes.buffer);
    this.#append(HEADER);
  }

  /** Bytes written so far. */
  get length(): number {
    return this.#length;
  }

  add(row: readonly unknown[]): void {
    this.#room(2);
    this.#view.setInt16(this.#length, this.columns.length);
    this.#length += 2;
    for (let i = 0; i < this.columns.length; i += 1) this.#value(row[i], this.columns[i]!.type);
    this.rows += 1;
  }

  /** The finished message; the encoder is spent. */
  finish(): Uint8Array<ArrayBuffer> {
    this.#room(2);
    this.#view.setInt16(this.#length, -1);
    return this.#bytes.subarray(0, this.#length + 2);
  }

  /** The same as {@link finish}, with its count of rows. */
  piece(): CopyPiece {
    return { rows: this.rows, bytes: this.finish() };
  }

  #value(value: unknown, type: BulkType): void {
    // NaN stands for a missing number in typed columns.
    if (value === null || value === undefined || Number.isNaN(value)) return this.#int4(-1);
    switch (type) {
      case 'int4':
        this.#int4(4);
        return this.#int4(value as number);
      case 'int8':
        this.#int4(8);
        this.#room(8);
        this.#view.setBigInt64(this.#length, BigInt(value as number | bigint));
        this.#length += 8;
        return;
      case 'float8':
        this.#int4(8);
        this.#room(8);
        this.#view.setFloat64(this.#length, value as number);
        this.#length += 8;
        return;
      case 'uuid':
        return this.#sized(Buffer.from((value as string).replaceAll('-', ''), 'hex'));
      case 'bytea':
        return this.#sized(value as Uint8Array);
      case 'text':
        // PostgreSQL has no place for the character NUL.
        return this.#sized(Buffer.from((value as string).replaceAll(NUL, '')));
      case 'jsonb':
        return this.#sized(Buffer.from(`\u0001${jsonOf(value).replaceAll('\\u0000', '')}`));
    }
  }

  #sized(bytes: Uint8Array): void {
    this.#int4(bytes.length);
    this.#append(bytes);
  }

  #int4(value: number): void {
    this.#room(4);
    this.#view.setInt32(this.#length, value);
    this.#length += 4;
  }

  #append(bytes: Uint8Array): void {
    this.#room(bytes.length);
    this.#bytes.set(bytes, this.#length);
    this.#length += bytes.length;
  }

  #room(more: number): void {
    if (this.#length + more <= this.#bytes.length) return;
    const larger = new Uint8Array(Math.max(this.#length + more, this.#bytes.length * 2));
    larger.set(this.#bytes.subarray(0, this.#length));
    this.#bytes = larger;
    this.#view = new DataView(larger.buffer);
  }
}

function jsonOf(value: unknown): string {
  return value instanceof JsonText ? value.text : JSON.stringify(value);
}
