import type { BulkType } from './bulk.ts';

const HEADER_BYTES = 19;
const TEXT = new TextDecoder();

/** Rows out of PostgreSQL's binary COPY format, fed in pieces cut anywhere. */
export class CopyDecoder {
  #rest: Uint8Array = new Uint8Array(0);
  #begun = false;
  #ended = false;

  constructor(private readonly types: readonly BulkType[]) {}

  /** Whole rows that `piece` completes. */
  push(piece: Uint8Array): unknown[][] {
    const bytes = this.#rest.length === 0 ? piece : Buffer.concat([this.#rest, piece]);
    const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    const rows: unknown[][] = [];
    let at = 0;
    if (!this.#begun) {
      if (bytes.length < HEADER_BYTES) return this.#wait(bytes, rows);
      at = HEADER_BYTES + view.getInt32(15);
      this.#begun = true;
    }
    while (!this.#ended) {
      const end = this.#endOfRow(view, at);
      if (end < 0) break;
      rows.push(this.#row(bytes, view, at + 2));
      at = end;
    }
    return this.#wait(bytes.subarray(at), rows);
  }

  #wait(rest: Uint8Array, rows: unknown[][]): unknown[][] {
    this.#rest = rest;
    return rows;
  }

  /** Where the row at `at` ends; -1 when it is not whole yet or there are no more. */
  #endOfRow(view: DataView, at: number): number {
    if (at + 2 > view.byteLength) return -1;
    const fields = view.getInt16(at);
    if (fields === -1) {
      this.#ended = true;
      return -1;
    }
    if (fields !== this.types.length) throw new Error(`expected ${this.types.length} columns, the query has ${fields}`);
    at += 2;
    for (let i = 0; i < fields; i += 1) {
      if (at + 4 > view.byteLength) return -1;
      at += 4 + Math.max(0, view.getInt32(at));
    }
    return at > view.byteLength ? -1 : at;
  }

  #row(bytes: Uint8Array, view: DataView, at: number): unknown[] {
    return this.types.map((type) => {
      const length = view.getInt32(at);
      const from = at + 4;
      at = from + Math.max(0, length);
      return length < 0 ? null : toValue(type, bytes, view, from, at);
    });
  }
}

function toValue(type: BulkType, bytes: Uint8Array, view: DataView, from: number, to: number): unknown {
  switch (type) {
    case 'int4':
      return view.getInt32(from);
    case 'int8':
      return Number(view.getBigInt64(from));
    case 'float8':
      return view.getFloat64(from);
    case 'uuid': {
      const hex = Buffer.from(bytes.buffer, bytes.byteOffset + from, 16).toString('hex');
      return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-${hex.slice(12, 16)}-${hex.slice(16, 20)}-${hex.slice(20)}`;
    }
    case 'bytea':
      // A copy, so that it begins on a boundary any typed array accepts and does not hold the whole message.
      return new Uint8Array(bytes.subarray(from, to));
    case 'text':
      return TEXT.decode(bytes.subarray(from, to));
    case 'jsonb':
      return JSON.parse(TEXT.decode(bytes.subarray(from + 1, to)));
  }
}
