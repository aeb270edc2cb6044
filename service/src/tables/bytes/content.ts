import { type ByteSource, type ReaderLimits, TableError } from '../table.ts';
import { gunzip } from './gunzip.ts';

const HEAD_BYTES = 256 * 1024;

/** The bytes of a file after decompression. */
export interface Content {
  name?: string;
  /** The first quarter of a megabyte, or less when the file is shorter. */
  head: Buffer;
  /** Whether `head` is all there is. */
  complete: boolean;
  /** Bytes in all; null when only reading to the end would tell. */
  size: number | null;
  /** Of a text that was not UTF-8: what it was. */
  encoding?: string;
  stream(from?: number): AsyncIterable<Uint8Array>;
}

/** Opens a file: unpacks gzip, refuses what is empty, over the limit or packed in another way. */
export async function openContent(source: ByteSource, limits: ReaderLimits): Promise<Content> {
  if (source.size === 0) {
    throw new TableError('empty', 'The file is empty.', 'Export or upload it again.', { byte: 0 });
  }
  if (source.size > limits.maxBytes) {
    throw new TableError(
      'too-large',
      `The file has ${source.size} bytes, more than the limit of ${limits.maxBytes}.`,
      'Split it, pack it with gzip, or have the limit on file size raised.',
      { byte: limits.maxBytes },
    );
  }
  const raw = await readUpTo(source.stream(), 4);
  const packed = raw[0] === 0x1f && raw[1] === 0x8b;
  const stream = packed ? (from = 0) => skipBytes(gunzip(source.stream(), limits), from) : source.stream;
  const { head, complete } = await readHead(stream(), HEAD_BYTES);
  if (head.length === 0) {
    throw new TableError('empty', 'The packed file holds nothing.', 'Pack it again.', { byte: 0 });
  }
  return {
    ...(source.name === undefined ? {} : { name: source.name }),
    head,
    complete,
    size: packed ? (complete ? head.length : null) : source.size,
    stream,
  };
}

/** The first `length` bytes of a stream; a fault after some bytes were read only shortens the answer. */
export async function readHead(stream: AsyncIterable<Uint8Array>, length: number) {
  const pieces: Uint8Array[] = [];
  let held = 0;
  let complete = true;
  try {
    for await (const piece of stream) {
      pieces.push(piece);
      held += piece.length;
      if (held > length) {
        complete = false;
        break;
      }
    }
  } catch (error) {
    if (held === 0) throw error;
    complete = false;
  }
  return { head: Buffer.concat(pieces).subarray(0, length), complete };
}

async function readUpTo(stream: AsyncIterable<Uint8Array>, length: number): Promise<Buffer> {
  return (await readHead(stream, length)).head;
}

async function* skipBytes(stream: AsyncIterable<Uint8Array>, count: number): AsyncIterable<Uint8Array> {
  let left = count;
  for await (const piece of stream) {
    if (left >= piece.length) left -= piece.length;
    else {
      yield left > 0 ? piece.subarray(left) : piece;
      left = 0;
    }
  }
}
