import { isUtf8 } from 'node:buffer';
import { TableError } from '../table.ts';
import type { Content } from './content.ts';

export type TextEncoding = 'utf-8' | 'utf-16le' | 'utf-16be' | 'windows-1252';

/** Recognises the encoding of a text file by its mark, its zero bytes, or by not being UTF-8. */
export function detectEncoding(head: Uint8Array): TextEncoding {
  if (head[0] === 0xff && head[1] === 0xfe) return 'utf-16le';
  if (head[0] === 0xfe && head[1] === 0xff) return 'utf-16be';
  const sample = head.subarray(0, 4096);
  let even = 0;
  let odd = 0;
  for (let i = 0; i < sample.length; i++) {
    if (sample[i] !== 0) continue;
    if (i % 2 === 0) even++;
    else odd++;
  }
  // Latin text in UTF-16 has a zero in nearly every second byte, and in no other.
  if (odd > sample.length * 0.3 && even === 0) return 'utf-16le';
  if (even > sample.length * 0.3 && odd === 0) return 'utf-16be';
  return isUtf8(completeUtf8(head)) ? 'utf-8' : 'windows-1252';
}

/** Drops a multi-byte character cut by the end of a piece. */
function completeUtf8(bytes: Uint8Array): Uint8Array {
  for (let back = 1; back <= Math.min(4, bytes.length); back++) {
    const byte = bytes[bytes.length - back]!;
    if (byte < 0x80) return bytes;
    if (byte >= 0xc0) return bytes.subarray(0, bytes.length - back);
  }
  return bytes;
}

/** The same content as UTF-8 without a byte-order mark. */
export function asUtf8(content: Content): Content {
  const encoding = detectEncoding(content.head);
  if (encoding === 'utf-8')
    return content.head[0] === 0xef && content.head[1] === 0xbb ? withoutMark(content) : content;
  const recode = (stream: AsyncIterable<Uint8Array>) => transcode(stream, encoding);
  const text = new TextDecoder(encoding).decode(content.head, { stream: true });
  return {
    ...content,
    encoding,
    head: Buffer.from(text),
    size: null,
    stream: (from = 0) => dropFirst(recode(content.stream()), from),
  };
}

function withoutMark(content: Content): Content {
  return {
    ...content,
    head: content.head.subarray(3),
    size: content.size === null ? null : content.size - 3,
    stream: (from = 0) => content.stream(from + 3),
  };
}

async function* transcode(stream: AsyncIterable<Uint8Array>, encoding: TextEncoding): AsyncIterable<Uint8Array> {
  const decoder = new TextDecoder(encoding, { fatal: encoding !== 'windows-1252' });
  let byte = 0;
  try {
    for await (const piece of stream) {
      const text = decoder.decode(piece, { stream: true });
      byte += piece.length;
      if (text !== '') yield Buffer.from(text);
    }
    const rest = decoder.decode();
    if (rest !== '') yield Buffer.from(rest);
  } catch (error) {
    if (error instanceof TableError) throw error;
    const message = `The file begins as ${encoding.toUpperCase()} but breaks that encoding.`;
    throw new TableError('encoding', message, 'Save the table again as UTF-8.', { byte });
  }
}

async function* dropFirst(stream: AsyncIterable<Uint8Array>, count: number): AsyncIterable<Uint8Array> {
  let left = count;
  for await (const piece of stream) {
    if (piece.length > left) yield piece.subarray(left);
    left = Math.max(0, left - piece.length);
  }
}
