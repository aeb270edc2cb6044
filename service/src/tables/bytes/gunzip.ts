import { once } from 'node:events';
import { createGunzip } from 'node:zlib';
import { type ReaderLimits, TableError } from '../table.ts';

/** Expansion is judged only beyond this, so that a tiny file of blanks is not called a bomb. */
const FREE_BYTES = 4 * 1024 ** 2;
const PIECE_BYTES = 16 * 1024;

/**
 * Decompresses a gzip stream piece by piece. What was decompressed before a fault is yielded before the error.
 * @throws TableError `truncated`, `bad-data`, `expansion` or `too-large`, with the byte of the compressed file.
 */
export async function* gunzip(compressed: AsyncIterable<Uint8Array>, limits: ReaderLimits): AsyncIterable<Uint8Array> {
  const gzip = createGunzip({ chunkSize: 256 * 1024 });
  let ready: Uint8Array[] = [];
  let fault: Error | undefined;
  let taken = 0;
  let given = 0;
  gzip.on('data', (piece: Uint8Array) => ready.push(piece));
  gzip.on('error', (error) => (fault = error));
  const flush = function* () {
    const pieces = ready;
    ready = [];
    for (const piece of pieces) {
      given += piece.length;
      checkGrowth(taken, given, limits);
      yield piece;
    }
  };
  try {
    for await (const large of compressed) {
      for (let at = 0; at < large.length; at += PIECE_BYTES) {
        const piece = large.subarray(at, at + PIECE_BYTES);
        taken += piece.length;
        await new Promise<void>((done) => {
          const end = () => (gzip.off('error', end), done());
          gzip.once('error', end);
          gzip.write(piece, end);
        });
        yield* flush();
        if (fault) throw gzipError(fault, taken);
      }
    }
    const ended = Promise.race([once(gzip, 'end').catch(() => undefined), once(gzip, 'close').catch(() => undefined)]);
    gzip.end();
    await ended;
    yield* flush();
    if (fault) throw gzipError(fault, taken);
  } finally {
    gzip.destroy();
  }
}

function checkGrowth(taken: number, given: number, limits: ReaderLimits): void {
  if (given > limits.maxBytes) {
    throw new TableError(
      'too-large',
      `The file unpacks to more than the limit of ${limits.maxBytes} bytes.`,
      'Split the table, or have the limit on file size raised.',
      { byte: taken },
    );
  }
  if (given > FREE_BYTES && given > taken * limits.maxExpansion) {
    throw new TableError(
      'expansion',
      `The file unpacks to more than ${limits.maxExpansion} times its size; no real table does.`,
      'Upload the table unpacked.',
      { byte: taken },
    );
  }
}

function gzipError(fault: Error, byte: number): TableError {
  if (/unexpected end/.test(fault.message)) {
    return new TableError('truncated', 'The gzip file breaks off before its end.', 'Fetch or copy the file again.', {
      byte,
    });
  }
  return new TableError('bad-data', `The gzip data are damaged (${fault.message}).`, 'Fetch or pack the file again.', {
    byte,
  });
}
