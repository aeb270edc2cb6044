import { open, stat } from 'node:fs/promises';
import { basename } from 'node:path';
import type { ByteSource } from '../table.ts';

const PIECE_BYTES = 1024 ** 2;

/** A file on disk. The file is open only while a stream of it is being read. */
export async function fileSource(path: string, name = basename(path)): Promise<ByteSource> {
  const { size } = await stat(path);
  return { name, size, stream: (start = 0) => filePieces(path, start) };
}

async function* filePieces(path: string, start: number): AsyncIterable<Uint8Array> {
  const file = await open(path, 'r');
  try {
    for (let position = start; ;) {
      const piece = Buffer.allocUnsafeSlow(PIECE_BYTES);
      const { bytesRead } = await file.read(piece, 0, PIECE_BYTES, position);
      if (bytesRead === 0) return;
      yield piece.subarray(0, bytesRead);
      position += bytesRead;
    }
  } finally {
    await file.close();
  }
}

/** Bytes already in memory, handed out in pieces of `pieceBytes`. */
export function memorySource(bytes: Uint8Array, name?: string, pieceBytes = PIECE_BYTES): ByteSource {
  return {
    ...(name === undefined ? {} : { name }),
    size: bytes.length,
    async *stream(start = 0) {
      for (let at = start; at < bytes.length; at += pieceBytes) yield bytes.subarray(at, at + pieceBytes);
    },
  };
}
