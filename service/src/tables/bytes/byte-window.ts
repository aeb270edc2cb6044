import { type ReaderLimits, TableError } from '../table.ts';
import type { Content } from './content.ts';

/**
 * A window moving forward over a stream. Readers look at `buffer[start .. end]`, move `start` past what they have
 * taken and call `more` when a record is cut off; nothing before `start` is kept.
 */
export class ByteWindow {
  buffer: Buffer = Buffer.alloc(0);
  start = 0;
  end = 0;
  /** No further bytes will come. */
  ended = false;
  private readonly pieces: AsyncIterator<Uint8Array>;
  private nulAt = -1;

  constructor(
    content: Content,
    /** Offset in the file of the first byte of the window. */
    private offset: number,
    private readonly limits: ReaderLimits,
    private readonly refuseNul = false,
  ) {
    this.pieces = content.stream(offset)[Symbol.asyncIterator]();
  }

  /** Offset in the file of `buffer[start]`. */
  get position(): number {
    return this.offset + this.start;
  }

  /** Offset in the file of `buffer[index]`. */
  at(index: number): number {
    return this.offset + index;
  }

  /** Appends the next piece; false at the end of the file. Indices into `buffer` are void afterwards, `start` is kept. */
  async more(): Promise<boolean> {
    if (this.ended) return false;
    if (this.nulAt >= 0) throw nulError(this.nulAt);
    const next = await this.pieces.next();
    if (next.done) {
      this.ended = true;
      return false;
    }
    let piece = Buffer.from(next.value.buffer, next.value.byteOffset, next.value.length);
    if (this.refuseNul) {
      const nul = piece.indexOf(0);
      if (nul >= 0) {
        this.nulAt = this.offset + this.end + nul;
        piece = piece.subarray(0, nul);
      }
    }
    this.offset += this.start;
    const kept = this.buffer.subarray(this.start, this.end);
    this.buffer = kept.length === 0 ? piece : Buffer.concat([kept, piece]);
    this.start = 0;
    this.end = this.buffer.length;
    if (kept.length > this.limits.maxHeadBytes + 8 * this.limits.maxLineLength) {
      throw new TableError(
        'line-too-long',
        'A record is longer than any limit allows.',
        'Check that the file is whole.',
        {
          byte: this.offset,
        },
      );
    }
    return true;
  }

  /** Reads on until `count` bytes are there; false when the file ends before. */
  async need(count: number): Promise<boolean> {
    while (this.end - this.start < count) if (!(await this.more())) return false;
    return true;
  }

  /** Moves past `count` bytes, however many; false when the file ends before. */
  async skip(count: number): Promise<boolean> {
    let left = count;
    while (left > this.end - this.start) {
      left -= this.end - this.start;
      this.start = this.end;
      if (!(await this.more())) return false;
    }
    this.start += left;
    return true;
  }

  /** Lets go of the file. */
  async close(): Promise<void> {
    await this.pieces.return?.();
  }
}

/** What is said of a NUL byte in a text table. */
export function nulError(byte: number): TableError {
  const message = `The text holds a NUL byte (byte ${byte}); text tables have none.`;
  return new TableError('nul-byte', message, 'The file is damaged or not text: export or fetch it again.', { byte });
}
