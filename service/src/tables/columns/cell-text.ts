import { isUtf8 } from 'node:buffer';

const windows1252 = new TextDecoder('windows-1252');

/** The text of a cell: UTF-8, or Windows-1252 where the bytes are not UTF-8. */
export function cellText(bytes: Uint8Array, start = 0, end = bytes.length): string {
  const cell = Buffer.from(bytes.buffer, bytes.byteOffset + start, end - start);
  return isUtf8(cell) ? cell.toString('utf8') : windows1252.decode(cell);
}
