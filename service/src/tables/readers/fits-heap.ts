import { ByteWindow } from '../bytes/byte-window.ts';
import type { Content } from '../bytes/content.ts';
import { type ReaderLimits, TableError } from '../table.ts';

/** Going back in a packed file means unpacking it again from its beginning. */
const MAX_RETURNS = 16;

/** The heap of a FITS table, read forward for one column; rows nearly always follow each other there. */
export class FitsHeap {
  private window: ByteWindow | undefined;
  private returns = 0;

  constructor(
    private readonly content: Content,
    private readonly start: number,
    private readonly limits: ReaderLimits,
  ) {}

  /** Brings `length` bytes at `offset` into the buffer and answers their index in it; -1 when the file ends before. */
  async locate(offset: number, length: number): Promise<number> {
    const place = this.start + offset;
    if (this.window === undefined || place < this.window.position) {
      await this.close();
      if (this.window !== undefined && this.content.size === null && ++this.returns > MAX_RETURNS) {
        const message = 'The variable-length cells of this packed file are out of order.';
        throw new TableError('unsupported', message, 'Upload the file unpacked.', { byte: place });
      }
      this.window = new ByteWindow(this.content, place, this.limits);
    }
    if (!(await this.window.skip(place - this.window.position))) return -1;
    return (await this.window.need(length)) ? this.window.start : -1;
  }

  get buffer(): Buffer {
    return this.window!.buffer;
  }

  async close(): Promise<void> {
    await this.window?.close();
  }
}
