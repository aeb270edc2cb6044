import { TableError } from '../table.ts';
import type { ByteWindow } from './byte-window.ts';

const LESS = 0x3c;
const EQUALS = 0x3d;
/** 0 not allowed, 1 a digit of base64, 2 white space. */
const KINDS = new Uint8Array(256);
for (const byte of Buffer.from('ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/')) KINDS[byte] = 1;
for (const byte of Buffer.from(' \t\r\n')) KINDS[byte] = 2;

/** The bytes of a base64 text that ends at the next "<", decoded piece by piece. */
export class Base64Window {
  buffer: Buffer = Buffer.alloc(0);
  start = 0;
  end = 0;
  private digits: Buffer = Buffer.alloc(0);
  private ended = false;

  constructor(private readonly text: ByteWindow) {}

  /** Offset in the file up to which the text was taken. */
  get position(): number {
    return this.text.position;
  }

  /**
   * Decodes a further piece; false at the end of the text.
   * @throws TableError `truncated` when the file ends first, `bad-data` at a character that is not base64.
   */
  async more(): Promise<boolean> {
    if (this.ended) return false;
    const { text } = this;
    if (text.start === text.end && !(await text.more())) {
      const message = `The file breaks off inside the base64 data (byte ${text.position}).`;
      throw new TableError('truncated', message, 'Fetch the table again.', { byte: text.position });
    }
    const digits = this.collect();
    const whole = this.ended ? digits.length : digits.length - (digits.length % 4);
    this.digits = digits.subarray(whole);
    const decoded = Buffer.from(digits.toString('latin1', 0, whole), 'base64');
    const kept = this.buffer.subarray(this.start, this.end);
    this.buffer = kept.length === 0 ? decoded : Buffer.concat([kept, decoded]);
    this.start = 0;
    this.end = this.buffer.length;
    return true;
  }

  close(): Promise<void> {
    return this.text.close();
  }

  private collect(): Buffer {
    const { text } = this;
    const digits = Buffer.allocUnsafe(this.digits.length + text.end - text.start);
    let length = this.digits.copy(digits);
    for (let i = text.start; i < text.end; i++) {
      const byte = text.buffer[i]!;
      const kind = KINDS[byte];
      if (kind === 1) digits[length++] = byte;
      else if (kind !== 2 && byte !== EQUALS) {
        if (byte === LESS) {
          this.ended = true;
          text.start = i;
          return digits.subarray(0, length);
        }
        const place = text.at(i);
        const message = `The character at byte ${place} is not base64.`;
        throw new TableError('bad-data', message, 'Export or fetch the table again.', { byte: place });
      }
    }
    text.start = text.end;
    return digits.subarray(0, length);
  }
}
